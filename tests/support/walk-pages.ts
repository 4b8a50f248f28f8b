/** Opens every page of a running program as one caller, and says where it was let in wrongly or not. */
import { mayEnter, PAGES, sampleAddress, type Caller } from "./permission-table";

/**
 * @param url of the program, without a slash at the end
 * @param cookie "name=value", or null for nobody
 * @returns a sentence for each page that answered otherwise than the table says
 */
export async function walkPages(
  url: string,
  caller: Caller,
  cookie: string | null,
): Promise<string[]> {
  const wrong: string[] = [];
  for (const [pattern, access] of Object.entries(PAGES)) {
    const response = await fetch(url + sampleAddress(pattern), {
      headers: cookie ? { cookie } : {},
      redirect: "manual",
    });
    await response.body?.cancel();
    const { status } = response;
    const location = response.headers.get("location") ?? "";
    const sentToSignIn = status === 307 && location.startsWith("/sign-in?next=");
    const isNobody = caller === "nobody" || caller === "removed";
    const expected = mayEnter(access, caller)
      ? // A sample need not exist, and /sign-in leads a signed-in person on.
        status === 200 || status === 404 || (status === 307 && !sentToSignIn)
      : isNobody
        ? sentToSignIn
        : status === 403;
    if (!expected) wrong.push(`${pattern} as ${caller}: ${status} ${location}`.trim());
  }
  return wrong;
}
