/** Accuracy classes of OIML R 76 that a shed meets; "none": not verified, with a stated accuracy. */
export const SCALE_CLASSES = ["III", "IIII", "none"] as const;
export type ScaleClass = (typeof SCALE_CLASSES)[number];

export const TARE_KINDS = ["container", "sack"] as const;
export type TareKind = (typeof TARE_KINDS)[number];
