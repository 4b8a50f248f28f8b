/** Accuracy classes of OIML R 76 that a shed meets; "none": not verified, with a stated accuracy. */
export const SCALE_CLASSES = ["III", "IIII", "none"] as const;
export type ScaleClass = (typeof SCALE_CLASSES)[number];

export const TARE_KINDS = ["container", "sack"] as const;
export type TareKind = (typeof TARE_KINDS)[number];

export const SCALE_CLASS_NAMES: Record<ScaleClass, string> = {
  III: "Class III",
  IIII: "Class IIII",
  none: "Not verified",
};

export const TARE_KIND_NAMES: Record<TareKind, string> = { container: "Container", sack: "Sack" };
