/** The second yardstick: node:http and the same rows by hand. `node by-hand-server.mjs PORT`, DATABASE_FILE. */
import http from "node:http";
import { saverOf } from "./by-hand.mjs";

const save = saverOf(process.env.DATABASE_FILE);
http
  .createServer((request, response) => {
    const pieces = [];
    request.on("data", (piece) => pieces.push(piece));
    request.on("end", () => {
      try {
        const answer = save(Buffer.concat(pieces).toString("utf8"));
        response.writeHead(200, { "content-type": "application/json" }).end(answer);
      } catch (error) {
        response.writeHead(500).end(String(error));
      }
    });
  })
  .listen(Number(process.argv[2]), "127.0.0.1");
