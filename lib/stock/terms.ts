/** How a palette colour looks: one solid colour, see-through, or many. */
export const COLOUR_LOOKS = ["solid", "clear", "mixed"] as const;
export type ColourLook = (typeof COLOUR_LOOKS)[number];

/** The palette that a scheme starts with (product.md, Sorting); coordinators may add and change. */
export const FIRST_PALETTE: readonly {
  code: string;
  name: string;
  hex: string;
  look: ColourLook;
}[] = [
  { code: "clear", name: "Clear or natural", hex: "#e6e6dc", look: "clear" },
  { code: "white", name: "White", hex: "#f5f3ec", look: "solid" },
  { code: "grey", name: "Grey", hex: "#8d9490", look: "solid" },
  { code: "black", name: "Black", hex: "#17201d", look: "solid" },
  { code: "brown", name: "Brown", hex: "#7a4b2a", look: "solid" },
  { code: "red", name: "Red", hex: "#e2553d", look: "solid" },
  { code: "orange", name: "Orange", hex: "#f08a24", look: "solid" },
  { code: "yellow", name: "Yellow", hex: "#f0b429", look: "solid" },
  { code: "green", name: "Green", hex: "#2f9e6e", look: "solid" },
  { code: "light-blue", name: "Light blue", hex: "#8fb8e8", look: "solid" },
  { code: "blue", name: "Blue", hex: "#1f46d6", look: "solid" },
  { code: "purple", name: "Purple", hex: "#7c5cc9", look: "solid" },
  { code: "pink", name: "Pink", hex: "#e8a2b8", look: "solid" },
  { code: "mixed", name: "Mixed", hex: "#b9b3a3", look: "mixed" },
];
