/** The weigh-in page as a browser test uses it. */
import { expect, type Locator, type Page } from "@playwright/test";
import type { E2eServer } from "./e2e-server";

/** "K7Q29F4M" as the page shows it. */
export const shown = (code: string): string => `${code.slice(0, 4)}-${code.slice(4)}`;

export const codeField = (page: Page): Locator => page.getByLabel("Bag", { exact: true });
export const gross = (page: Page): Locator => page.getByLabel("On the scale");
export const save = (page: Page): Locator => page.getByRole("button", { name: /^Save/ });
export const tickets = (page: Page): Locator =>
  page.getByRole("region", { name: "Today's tickets" });
export const waiting = (page: Page): Locator =>
  page.getByRole("region", { name: "Waiting to send" });

/** The desk of one running program: its unused tags, and what became of a bag. */
export function weighInDesk(server: E2eServer) {
  const codes = server
    .query<{ code: string }>("select code from bags order by code")
    .map(({ code }) => code);
  return {
    nextCode: (): string => {
      const code = codes.pop();
      if (!code) throw new Error("The scheme has no tag left for this test.");
      return code;
    },
    netOf: (code: string) =>
      server.query<{ state: string; grams: number }>(
        `select w.state, w.net_grams as grams from weigh_ins w join bags b on b.id = w.bag_id
          where b.code = ? order by w.recorded_at`,
        code,
      ),
    /** Signs in as a volunteer and opens the page. */
    open: async (page: Page): Promise<void> => {
      await server.signIn(page.context(), "volunteer");
      await page.goto(`${server.url}/weigh-in`);
      await expect(gross(page)).toBeVisible();
    },
  };
}
