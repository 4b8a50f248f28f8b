/** The queue's store in IndexedDB. */
import { openDB, type DBSchema, type IDBPDatabase } from "idb";
import type { QueueStore } from "./outbox";
import type { QueueItem } from "./queue";

interface OfflineDatabase extends DBSchema {
  queue: { key: string; value: QueueItem };
}

const NAME = "bismar-offline";

/**
 * Opens the store when it is first used. A database that another tab's newer version closed is opened anew.
 */
export function idbStore(): QueueStore {
  let opening: Promise<IDBPDatabase<OfflineDatabase>> | null = null;

  const database = (): Promise<IDBPDatabase<OfflineDatabase>> => {
    opening ??= openDB<OfflineDatabase>(NAME, 1, {
      upgrade(db) {
        db.createObjectStore("queue", { keyPath: "requestId" });
      },
      blocking: () => void opening?.then((db) => db.close()).then(() => (opening = null)),
      terminated: () => (opening = null),
    }).catch((error: unknown) => {
      opening = null;
      throw error;
    });
    return opening;
  };

  return {
    async all() {
      return (await database()).getAll("queue");
    },
    async put(item) {
      await (await database()).put("queue", item);
    },
    async replace(item) {
      const tx = (await database()).transaction("queue", "readwrite");
      if (await tx.store.getKey(item.requestId)) await tx.store.put(item);
      await tx.done;
    },
    async remove(requestId) {
      await (await database()).delete("queue", requestId);
    },
  };
}
