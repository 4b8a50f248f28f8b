/** The pictures of the corpus: which there are, and how each is made. Same seed, same pixels. */
import { drawCode, tagAddress, type LabelCode } from "@/lib/core/bag-code";
import type { GreyImage } from "@/tests/support/scan-sheets";
import { randomOf, type Random } from "./random";
import { KINDS, SEVERITIES, type Kind, type Severity } from "./severities";
import {
  blur,
  develop,
  dirt,
  drops,
  expose,
  glare,
  grain,
  slope,
  smear,
  type Patch,
} from "./spoil";
import { tagFace, wordsFace, type Face } from "./tag-face";
import { HEIGHT, seen, WIDTH, type Pose, type Surface } from "./view";

export const SEED = "saltmarsh 1";
export const EACH = 12;
const OTHERS = 24;

const HOSTS = [
  "https://shed.example",
  "https://bismar.saltmarsh.example",
  "http://192.168.1.20:3000",
  "https://plastics-shed.saltmarsh.example",
];
const FOREIGN = [
  "https://museum.example/opening-hours",
  "WIFI:T:WPA;S:Harbour guests;P:not-a-real-one;;",
  "MENU 14",
  "https://shed.example/points/4",
  "0123456789012345678901234567890123456789",
  "BEGIN:VCARD\nFN:Nobody\nEND:VCARD",
];

export type Picture = {
  name: string;
  /** A kind of damage, or what else is in the picture. */
  kind: Kind | "no tag" | "foreign QR";
  severity: Severity;
  /** What a decoder should say; null when there is no symbol. */
  text: string | null;
};

/** Every picture of the corpus, in order. */
export function pictures(): Picture[] {
  const random = randomOf(`${SEED} codes`);
  const ours = (): string => tagAddress(random.pick(HOSTS), drawCode(random.whole));
  const damaged = KINDS.flatMap((kind) =>
    ([0, 1, 2] as const).flatMap((severity) =>
      Array.from({ length: EACH }, (_, at) => ({
        name: `${kind.replace(" ", "-")}-${severity + 1}-${String(at + 1).padStart(2, "0")}`,
        kind,
        severity,
        text: ours(),
      })),
    ),
  );
  const others = (["no tag", "foreign QR"] as const).flatMap((kind) =>
    Array.from({ length: OTHERS }, (_, at) => ({
      name: `${kind.replace(" ", "-").toLowerCase()}-${String(at + 1).padStart(2, "0")}`,
      kind,
      severity: (at % 3) as Severity,
      text: kind === "no tag" ? null : (FOREIGN[at % FOREIGN.length] ?? null),
    })),
  );
  return [...damaged, ...others];
}

/** The code at the end of one of our addresses. */
const codeOf = (text: string): LabelCode => text.slice(-8) as LabelCode;

function faceOf(picture: Picture, random: Random): Face {
  if (picture.kind === "foreign QR") return tagFace(picture.text ?? "", null);
  if (picture.text !== null) return tagFace(picture.text, codeOf(picture.text));
  const word = () =>
    Array.from({ length: 6 }, () => random.pick(Array.from("ABCDEFHKMNPRSTXYZ"))).join("");
  const stripes = Array.from({ length: 50 }, () => random.between(0.4, 1.6));
  return wordsFace([word(), word(), word()], stripes);
}

/** Creases across the label: each pulls the paper to both sides and catches the light on one. */
function wrinkles(deepMm: number, random: Random): Surface {
  const creases = Array.from({ length: 6 }, () => {
    const angle = random.between(0, Math.PI);
    return {
      nx: Math.cos(angle),
      ny: Math.sin(angle),
      at: random.between(-16, 16),
      wide: random.between(2, 5),
      deep: deepMm * random.between(0.5, 1) * (random.next() < 0.5 ? -1 : 1),
    };
  });
  return (x, y) => {
    let [dxMm, dyMm, shade] = [0, 0, 1];
    for (const { nx, ny, at, wide, deep } of creases) {
      const distance = (x * nx + y * ny - at) / wide;
      if (Math.abs(distance) > 3) continue;
      const bell = Math.exp(-distance * distance);
      dxMm += nx * deep * bell;
      dyMm += ny * deep * bell;
      shade += (0.35 * deep * distance * bell) / wide;
    }
    return { dxMm, dyMm, shade: Math.max(0.35, shade) };
  };
}

/** Draws one picture; jpeg's own damage is done by its encoder afterwards. */
export function draw(picture: Picture): GreyImage {
  const random = randomOf(`${SEED} ${picture.name}`);
  const face = faceOf(picture, random);
  const { kind, severity } = picture;
  const amount = (of: Kind): number => (of === kind ? SEVERITIES[of][severity] : 0);
  const radians = (degrees: number) => (degrees * Math.PI) / 180;

  const modulePx = amount("small") || random.between(5, 6.5);
  const moduleMm = face.symbol ? face.symbol.sideMm / face.symbol.modules : 1;
  const pxPerMm = modulePx / moduleMm;
  const sign = random.next() < 0.5 ? -1 : 1;
  const turned = amount("rotation");
  const tilted = amount("perspective");
  const pose: Pose = {
    roll: radians(turned ? sign * turned * random.between(0.6, 1) : random.between(-8, 8)),
    tilt: radians(tilted || random.between(0, 10)),
    tiltAxis: random.between(0, 2 * Math.PI),
    pxPerMm,
    atX: WIDTH / 2 + random.between(-60, 30),
    atY: HEIGHT / 2 + random.between(-40, 40),
  };
  const deep = amount("wet wrinkles") * moduleMm;
  const faded = amount("low contrast");
  const paper = random.between(0.8, 0.92);
  const light = seen(
    {
      face,
      pose,
      surface: deep ? wrinkles(deep, random) : null,
      paper: faded ? 0.7 : paper,
      ink: faded ? 0.7 - faded : random.between(0.04, 0.1),
    },
    random,
  );

  const sidePx = (face.symbol?.modules ?? 29) * modulePx;
  const symbol: Patch = { x: pose.atX, y: pose.atY, areaPx: sidePx * sidePx };
  const within = (share: number): Patch => ({
    x: pose.atX + random.between(-0.4, 0.4) * sidePx,
    y: pose.atY + random.between(-0.4, 0.4) * sidePx,
    areaPx: sidePx * sidePx * share,
  });
  if (kind === "dirt") {
    const parts = 3 + random.whole(3);
    dirt(
      light,
      Array.from({ length: parts }, () => within(amount("dirt") / parts)),
      random,
    );
  }
  if (deep) drops(light, symbol, 4 + 4 * severity, random);
  slope(light, random.between(0.1, faded ? 0.5 : 0.35), random.between(0, 2 * Math.PI));
  if (kind === "glare") glare(light, within(amount("glare")), random);
  blur(light, amount("blur") ? amount("blur") * modulePx : 0.6);
  if (kind === "motion") smear(light, amount("motion") * modulePx, random.between(0, Math.PI));
  if (kind === "low light") expose(light, amount("low light"), 14, random);
  grain(light, (amount("noise") || 2.5) / 235, random);
  // A camera's gain ends somewhere: in little light the picture stays dark too.
  const white = kind === "low light" ? 1.5 + severity : 1;
  return { width: WIDTH, height: HEIGHT, pixels: develop(light, white) };
}
