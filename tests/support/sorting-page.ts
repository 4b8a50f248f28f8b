/** The sorting table as a browser test uses it. */
import { expect, type Locator, type Page } from "@playwright/test";
import { newId } from "@/lib/core/ids";
import type { E2eServer } from "./e2e-server";

/** "K7Q29F4M" as the page shows it. */
export const shown = (code: string): string => `${code.slice(0, 4)}-${code.slice(4)}`;

export const save = (page: Page): Locator =>
  page.getByRole("button", { name: /^Save \d+ weights?, close (bag|\d+ bags)$/ });

export async function addPile(page: Page, colour: string, kg: string): Promise<void> {
  await page.getByRole("button", { name: "Add pile" }).click();
  const dialog = page.getByRole("dialog");
  await dialog.getByRole("radio", { name: "HDPE" }).check();
  await dialog.getByRole("radio", { name: colour, exact: true }).check();
  await dialog.getByLabel("Kind").selectOption("lids");
  await dialog.getByLabel("The scale shows").fill(kg);
  await dialog.getByRole("button", { name: /^Put/ }).click();
  await expect(dialog).toBeHidden();
}

/** A reading of so many grams on the pan. */
export const onPan = (grams: number) => ({
  grossMilligrams: grams * 1000,
  containerId: null,
  containerTareMilligrams: 0,
  sackId: null,
  sackTareMilligrams: 0,
});

/** The shed of one running program: its unused tags, bags weighed in, and what the ledger holds. */
export function sortingShed(server: E2eServer) {
  const codes = server
    .query<{ code: string }>("select code from bags order by code")
    .map(({ code }) => code);
  const [scale] = server.query<{ id: string }>("select id from scales order by number limit 1");
  if (!scale) throw new Error("The scheme has no scale.");

  /** A write over HTTP, in the page's session. */
  const post = async (page: Page, path: string, data: object): Promise<unknown> => {
    const answer = await page.request.post(`${server.url}${path}`, {
      headers: { origin: server.url },
      data: { requestId: newId(), ...data },
    });
    expect(answer.status(), await answer.text()).toBe(200);
    return answer.json();
  };

  return {
    scaleId: scale.id,
    post,
    unused: (): string => {
      const code = codes.pop();
      if (!code) throw new Error("The scheme has no tag left for this test.");
      return code;
    },
    /** Weighs a bag in over HTTP, as the weigh-in page does. */
    async weighedBag(page: Page, grams: number, more: object = {}): Promise<string> {
      const code = this.unused();
      await post(page, "/api/weigh-ins", {
        code,
        scaleId: scale.id,
        occurredAt: Date.now(),
        readings: [onPan(grams)],
        ...more,
      });
      return code;
    },
    lotSums: () =>
      server.query<{ grams: number }>(
        "select b.grams from balances b join lots l on l.holder_id = b.holder_id order by l.number",
      ),
  };
}
