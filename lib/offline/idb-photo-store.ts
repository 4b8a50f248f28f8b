/** The store of photos in IndexedDB, in a database of its own: tickets never wait for pictures. */
import { openDB, type DBSchema, type IDBPDatabase } from "idb";
import type { PhotoStore } from "./photo-box";
import type { PhotoItem } from "./photo-queue";

/** The pictures stand apart from what is said of them, which changes and is listed far more often. */
interface PhotoDatabase extends DBSchema {
  photos: { key: string; value: Omit<PhotoItem, "blob"> };
  /** Bytes, not a Blob: not every browser can store one, in a private window above all. */
  pictures: { key: string; value: ArrayBuffer };
}

const NAME = "bismar-photos";
const BOTH: ["photos", "pictures"] = ["photos", "pictures"];

/** Opens the store when it is first used; one that another tab's newer version closed is opened anew. */
export function idbPhotoStore(): PhotoStore {
  let opening: Promise<IDBPDatabase<PhotoDatabase>> | null = null;
  /** The same Blob each time, so that what shows it does not load it anew at every change. */
  const blobs = new Map<string, Blob>();

  const database = (): Promise<IDBPDatabase<PhotoDatabase>> => {
    opening ??= openDB<PhotoDatabase>(NAME, 1, {
      upgrade(db) {
        db.createObjectStore("photos", { keyPath: "photoId" });
        db.createObjectStore("pictures");
      },
      blocking: () => void opening?.then((db) => db.close()).then(() => (opening = null)),
      terminated: () => (opening = null),
    }).catch((error: unknown) => {
      opening = null;
      throw error;
    });
    return opening;
  };

  const blobOf = async (photoId: string): Promise<Blob | null> => {
    const known = blobs.get(photoId);
    if (known) return known;
    const bytes = await (await database()).get("pictures", photoId);
    if (!bytes) return null;
    const blob = new Blob([bytes], { type: "image/jpeg" });
    blobs.set(photoId, blob);
    return blob;
  };

  return {
    async all() {
      const items = await (await database()).getAll("photos");
      const whole = await Promise.all(
        items.map(async (item) => {
          const blob = await blobOf(item.photoId);
          return blob && { ...item, blob };
        }),
      );
      // One without its picture was taken off between the two readings.
      return whole.filter((item) => item !== null);
    },
    async put({ blob, ...item }) {
      const bytes = await blob.arrayBuffer();
      const tx = (await database()).transaction(BOTH, "readwrite");
      await Promise.all([
        tx.objectStore("photos").put(item),
        tx.objectStore("pictures").put(bytes, item.photoId),
        tx.done,
      ]);
      blobs.set(item.photoId, blob);
    },
    async replace({ blob: _blob, ...item }) {
      const tx = (await database()).transaction("photos", "readwrite");
      if (await tx.store.getKey(item.photoId)) await tx.store.put(item);
      await tx.done;
    },
    async remove(photoId) {
      const tx = (await database()).transaction(BOTH, "readwrite");
      await Promise.all([
        tx.objectStore("photos").delete(photoId),
        tx.objectStore("pictures").delete(photoId),
        tx.done,
      ]);
      blobs.delete(photoId);
    },
  };
}
