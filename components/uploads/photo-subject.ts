import type { PhotoSubject } from "@/lib/uploads/terms";

/** What photos belong to. */
export type PhotoSubjectRef = { kind: PhotoSubject; id: string };

/** Key of its photos among the client's reads. */
export const photosKey = ({ kind, id }: PhotoSubjectRef) => ["photos", kind, id] as const;
