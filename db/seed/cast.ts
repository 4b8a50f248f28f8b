/** Who and what the story plays with. */
import type { Db } from "@/db/client";
import type { Id, PersonId, PointId } from "@/lib/core/ids";
import type { Role } from "@/lib/core/permissions";
import type { Instant } from "@/lib/core/time";
import type { Context } from "@/lib/platform/context";
import type { Random } from "./random";
import type { StoryPoint } from "./story";

export type Cast = {
  db: Db;
  random: Random;
  /** A context of one of the people at a moment. */
  as: (who: PersonId, role: Role, at: Instant) => Context;
  requestId: (at: Instant) => string;
  volunteers: readonly PersonId[];
  lead: PersonId;
  coordinator: PersonId;
};

export type Tools = {
  bench: Id<"scale">;
  floor: Id<"scale">;
  tares: Record<string, { id: Id<"container">; milligrams: number }>;
};

export type Shed = { story: StoryPoint; id: PointId; codes: string[] };
