import { saverOf } from "../../../../by-hand.mjs";

export async function POST(request) {
  globalThis.save ??= saverOf(process.env.DATABASE_FILE);
  return new Response(globalThis.save(await request.text()), {
    headers: { "content-type": "application/json" },
  });
}
