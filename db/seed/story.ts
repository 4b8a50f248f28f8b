/**
 * Saltmarsh Plastics Shed, an invented scheme in an invented estuary town: its points, its people, what
 * neighbours bring. All of it is made up.
 */
import type { Kind } from "@/lib/core/plastics";
import type { PointKind } from "@/lib/points/terms";

export const SCHEME = { name: "Saltmarsh Plastics Shed", timeZone: "Europe/London" } as const;

/** One sign-in for each role (sign-ins.json) and two more volunteers. */
export const NAMES = {
  donor: "Maris Holm",
  volunteer: "Teal Sanderling",
  lead: "Rowan Dunlin",
  coordinator: "Wren Tidewell",
} as const;
export const MORE_VOLUNTEERS = [
  { name: "Brisa Knotfield", email: "brisa@saltmarsh.example" },
  { name: "Fenn Turnstone", email: "fenn@saltmarsh.example" },
] as const;

export type StoryPoint = {
  name: string;
  kind: Exclude<PointKind, "shed" | "not-known">;
  /** Bags a week in an ordinary week. */
  bagsPerWeek: number;
  /** Mean grams of a bag. */
  bagGrams: number;
  /** Share that cannot be used. */
  rejectShare: number;
  /** Summer against winter: above 1 where visitors come. */
  summer: number;
};

export const POINTS: readonly StoryPoint[] = [
  {
    name: "Harbour Road Library",
    kind: "library",
    bagsPerWeek: 3.2,
    bagGrams: 2100,
    rejectShare: 0.04,
    summer: 1,
  },
  {
    name: "Curlew Café",
    kind: "cafe",
    bagsPerWeek: 2.6,
    bagGrams: 1500,
    rejectShare: 0.06,
    summer: 1.6,
  },
  {
    name: "Saltings Primary School",
    kind: "school",
    bagsPerWeek: 2.8,
    bagGrams: 2600,
    rejectShare: 0.05,
    summer: 0.3,
  },
  {
    name: "Mudlark Boatyard",
    kind: "boatyard",
    bagsPerWeek: 1.4,
    bagGrams: 3400,
    rejectShare: 0.13,
    summer: 1.5,
  },
  {
    name: "Samphire Stores",
    kind: "shop",
    bagsPerWeek: 2.4,
    bagGrams: 1800,
    rejectShare: 0.05,
    summer: 1.2,
  },
  {
    name: "Creekside Community Hall",
    kind: "community-hall",
    bagsPerWeek: 2.0,
    bagGrams: 2300,
    rejectShare: 0.07,
    summer: 0.9,
  },
  {
    name: "Old Ropewalk Workshops",
    kind: "workplace",
    bagsPerWeek: 1.2,
    bagGrams: 2900,
    rejectShare: 0.08,
    summer: 0.9,
  },
  {
    name: "Tern Island Sailing Club",
    kind: "sports-club",
    bagsPerWeek: 1.0,
    bagGrams: 2200,
    rejectShare: 0.09,
    summer: 1.9,
  },
  {
    name: "Thursday Market Stall",
    kind: "market",
    bagsPerWeek: 1.8,
    bagGrams: 2700,
    rejectShare: 0.1,
    summer: 1.2,
  },
  {
    name: "Fulmar Lane Surgery",
    kind: "workplace",
    bagsPerWeek: 1.1,
    bagGrams: 1300,
    rejectShare: 0.03,
    summer: 1,
  },
  {
    name: "Marsh End Allotments",
    kind: "other",
    bagsPerWeek: 0.9,
    bagGrams: 3100,
    rejectShare: 0.15,
    summer: 1.4,
  },
  {
    name: "Eelgrass Upper School",
    kind: "school",
    bagsPerWeek: 2.2,
    bagGrams: 2400,
    rejectShare: 0.06,
    summer: 0.3,
  },
  {
    name: "Lantern Street Bakery",
    kind: "shop",
    bagsPerWeek: 1.6,
    bagGrams: 1400,
    rejectShare: 0.04,
    summer: 1.1,
  },
  {
    name: "Quayside Youth Club",
    kind: "community-hall",
    bagsPerWeek: 1.0,
    bagGrams: 1900,
    rejectShare: 0.08,
    summer: 0.8,
  },
];

export const SCALES = [
  {
    name: "Bench scale",
    class: "III",
    maxMilligrams: 15_000_000,
    eMilligrams: 5_000,
    dMilligrams: 5_000,
  },
  {
    name: "Floor scale",
    class: "III",
    maxMilligrams: 60_000_000,
    eMilligrams: 20_000,
    dMilligrams: 20_000,
  },
] as const;

export const TARES = [
  { kind: "container", name: "Grey crate", tareMilligrams: 1_850_000 },
  { kind: "container", name: "Blue tub", tareMilligrams: 620_000 },
  { kind: "container", name: "Sorting tray", tareMilligrams: 340_000 },
  { kind: "sack", name: "Paper sack", tareMilligrams: 85_000 },
  { kind: "sack", name: "Mesh sack", tareMilligrams: 60_000 },
] as const;

export type StoryMaterial = {
  polymer: "PE-HD" | "PP" | "PE-LD" | "PS" | "PET" | "not-sure";
  kind: Kind;
  colour: string;
};

/** What is in a bag, by how often it is met. */
export const MATERIALS: readonly (readonly [StoryMaterial, number])[] = [
  [{ polymer: "PE-HD", kind: "lids", colour: "blue" }, 15],
  [{ polymer: "PE-HD", kind: "lids", colour: "white" }, 13],
  [{ polymer: "PE-HD", kind: "lids", colour: "light-blue" }, 7],
  [{ polymer: "PE-HD", kind: "lids", colour: "green" }, 8],
  [{ polymer: "PE-HD", kind: "lids", colour: "yellow" }, 7],
  [{ polymer: "PE-HD", kind: "lids", colour: "red" }, 8],
  [{ polymer: "PE-HD", kind: "lids", colour: "pink" }, 2],
  [{ polymer: "PE-HD", kind: "bottles", colour: "white" }, 9],
  [{ polymer: "PE-HD", kind: "bottles", colour: "clear" }, 7],
  [{ polymer: "PE-HD", kind: "bottles", colour: "black" }, 3],
  [{ polymer: "PP", kind: "tubs", colour: "white" }, 8],
  [{ polymer: "PP", kind: "tubs", colour: "clear" }, 7],
  [{ polymer: "PP", kind: "lids", colour: "green" }, 5],
  [{ polymer: "PP", kind: "lids", colour: "orange" }, 3],
  [{ polymer: "PP", kind: "tubs", colour: "black" }, 5],
  [{ polymer: "PP", kind: "lids", colour: "yellow" }, 3],
  [{ polymer: "PP", kind: "cases", colour: "mixed" }, 2],
  [{ polymer: "PE-LD", kind: "lids", colour: "blue" }, 2],
  [{ polymer: "PE-LD", kind: "film", colour: "clear" }, 4],
  [{ polymer: "PE-LD", kind: "bottles", colour: "light-blue" }, 2],
  [{ polymer: "PS", kind: "cases", colour: "clear" }, 3],
  [{ polymer: "PS", kind: "tubs", colour: "white" }, 2],
  [{ polymer: "PET", kind: "bottles", colour: "clear" }, 4],
  [{ polymer: "not-sure", kind: "other", colour: "mixed" }, 1],
];

export const REJECTS: readonly (readonly [string, number])[] = [
  ["food", 30],
  ["film", 22],
  ["stuck", 14],
  ["black", 10],
  ["no-use", 9],
  ["compostable", 6],
  ["pvc", 4],
  ["brittle", 3],
  ["electronics", 1],
  ["sharps", 1],
];
