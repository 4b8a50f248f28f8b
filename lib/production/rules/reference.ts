/**
 * Invariant: what a plan computes with names its source, and a scheme's own value always comes before it.
 *
 * Densities: chosen inside the ranges of the handbook pages collected in fixtures/reference/densities.csv. Highest
 * processing temperatures: the lowest that any page of fixtures/reference/processing.csv prints as a polymer's highest
 * (bebonestool.com, "common plastic specific gravity and shrinkage"; plastic-industry.com, "processing guidelines",
 * Fahrenheit converted, PE for both polyethylenes, PA as nylon 6), because it is a "never above".
 * Densities of the melt, and everything of PLA's melt: from memory, no source.
 */
import { CEILING_CELSIUS, type Heatable } from "../terms";

type Reference = {
  /** Solid, in milligrams a cubic centimetre, and where it is from. */
  mgPerCm3: number;
  source: string;
  /** Melt at processing temperature, from memory. */
  meltMgPerCm3: number;
  /** Never above, in °C. */
  ceilingCelsius: number;
};

const HANDBOOKS = "inside the range of the handbooks";

export const REFERENCE: Readonly<Record<Heatable, Reference>> = {
  "PE-HD": {
    mgPerCm3: 955,
    source: `${HANDBOOKS}, 0.94 to 0.97`,
    meltMgPerCm3: 750,
    ceilingCelsius: CEILING_CELSIUS["PE-HD"],
  },
  PP: {
    mgPerCm3: 905,
    source: `${HANDBOOKS}, 0.89 to 0.92`,
    meltMgPerCm3: 730,
    ceilingCelsius: CEILING_CELSIUS.PP,
  },
  "PE-LD": {
    mgPerCm3: 920,
    source: `${HANDBOOKS}, 0.91 to 0.94`,
    meltMgPerCm3: 760,
    ceilingCelsius: CEILING_CELSIUS["PE-LD"],
  },
  PS: {
    mgPerCm3: 1050,
    source: `${HANDBOOKS}, 1.03 to 1.06`,
    meltMgPerCm3: 950,
    ceilingCelsius: CEILING_CELSIUS.PS,
  },
  PET: {
    mgPerCm3: 1380,
    source: `${HANDBOOKS}, 1.29 to 1.40`,
    meltMgPerCm3: 1170,
    ceilingCelsius: CEILING_CELSIUS.PET,
  },
  ABS: {
    mgPerCm3: 1050,
    source: `${HANDBOOKS}, 1.02 to 1.21`,
    meltMgPerCm3: 950,
    ceilingCelsius: CEILING_CELSIUS.ABS,
  },
  PLA: {
    mgPerCm3: 1250,
    source: "the one value that the handbooks give, 1.25",
    meltMgPerCm3: 1080,
    ceilingCelsius: CEILING_CELSIUS.PLA,
  },
  PA: {
    mgPerCm3: 1130,
    source: `${HANDBOOKS}, 1.13 to 1.16`,
    meltMgPerCm3: 970,
    ceilingCelsius: CEILING_CELSIUS.PA,
  },
  PC: {
    mgPerCm3: 1200,
    source: `${HANDBOOKS}, 1.20 to 1.22`,
    meltMgPerCm3: 1050,
    ceilingCelsius: CEILING_CELSIUS.PC,
  },
};
