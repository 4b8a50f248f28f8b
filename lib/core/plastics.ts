/**
 * Closed lists of the trade that several areas share: resin codes, polymers, kinds, forms, wash states.
 * Resin codes 1 to 7 are those of ASTM D7611, abbreviations those of ISO 1043-1
 * (fixtures/reference/ric_codes.csv, iso1043_terms.csv); they are stored. The trade's usual name is shown.
 */

export const POLYMERS = [
  "PET",
  "PE-HD",
  "PVC",
  "PE-LD",
  "PP",
  "PS",
  "ABS",
  "PLA",
  "PA",
  "PC",
  "O",
] as const;
/** ISO 1043-1 abbreviation, or one of the two other real answers. */
export type Polymer = (typeof POLYMERS)[number];
export const UNIDENTIFIED = ["mixed", "not-sure"] as const;
export type PolymerAnswer = Polymer | (typeof UNIDENTIFIED)[number];
export const POLYMER_ANSWERS = [...POLYMERS, ...UNIDENTIFIED] as const;

/** What volunteers read, and the resin code moulded into the item (null: none). */
export const POLYMER_NAMES: Record<PolymerAnswer, { name: string; resinCode: number | null }> = {
  PET: { name: "PET", resinCode: 1 },
  "PE-HD": { name: "HDPE", resinCode: 2 },
  PVC: { name: "PVC", resinCode: 3 },
  "PE-LD": { name: "LDPE", resinCode: 4 },
  PP: { name: "PP", resinCode: 5 },
  PS: { name: "PS", resinCode: 6 },
  ABS: { name: "ABS", resinCode: 7 },
  PLA: { name: "PLA", resinCode: 7 },
  PA: { name: "PA", resinCode: 7 },
  PC: { name: "PC", resinCode: 7 },
  O: { name: "Other", resinCode: 7 },
  mixed: { name: "Mixed, to sort", resinCode: null },
  "not-sure": { name: "Not sure", resinCode: null },
};

export const KINDS = [
  "lids",
  "bottles",
  "tubs",
  "film",
  "foam",
  "cases",
  "regrind",
  "other",
] as const;
export type Kind = (typeof KINDS)[number];
export const KIND_NAMES: Record<Kind, string> = {
  lids: "Lids",
  bottles: "Bottles",
  tubs: "Tubs and trays",
  film: "Film",
  foam: "Foam",
  cases: "Cases",
  regrind: "Own regrind",
  other: "Other",
};

export const FORMS = ["whole", "flake", "sheet", "offcut"] as const;
export type Form = (typeof FORMS)[number];
export const FORM_NAMES: Record<Form, string> = {
  whole: "Whole",
  flake: "Flake",
  sheet: "Sheet",
  offcut: "Offcut",
};

export const WASH_STATES = ["as-received", "washed", "dry"] as const;
export type WashState = (typeof WASH_STATES)[number];
export const WASH_NAMES: Record<WashState, string> = {
  "as-received": "As received",
  washed: "Washed, still damp",
  dry: "Dry",
};
