/** A label before a camera: where each pixel of the picture looks, and what is there. */
import type { Face } from "./tag-face";
import { smoothNoise, type Random } from "./random";

export const WIDTH = 640;
export const HEIGHT = 480;
/** Focal length in pixels: about 56 degrees across, a phone's usual lens in its middle. */
const FOCAL = 600;
const SUB = 3;

/** Light as a camera's sensor counts it: 0 none, 1 white paper well exposed. */
export type Light = Float32Array;

export type Pose = {
  /** Turned in the picture, and tilted away from the camera about an axis at `tiltAxis`; radians. */
  roll: number;
  tilt: number;
  tiltAxis: number;
  /** Pixels a millimetre of the label takes where the symbol's middle is. */
  pxPerMm: number;
  /** Where the symbol's middle is in the picture. */
  atX: number;
  atY: number;
};

/** Moves a point of the label and shades it: wrinkles. Millimetres in, millimetres and a factor out. */
export type Surface = (xMm: number, yMm: number) => { dxMm: number; dyMm: number; shade: number };

export type Scene = {
  face: Face;
  pose: Pose;
  surface: Surface | null;
  /** Reflectance of ink and paper, 0 to 1. */
  ink: number;
  paper: number;
};

/** Maps a pixel to millimetres of the label from the symbol's middle; false when it looks past the plane. */
function lookFrom(pose: Pose): (u: number, v: number, out: Float64Array) => boolean {
  const [cosRoll, sinRoll] = [Math.cos(pose.roll), Math.sin(pose.roll)];
  const [cosAxis, sinAxis] = [Math.cos(pose.tiltAxis), Math.sin(pose.tiltAxis)];
  const [cosTilt, sinTilt] = [Math.cos(pose.tilt), Math.sin(pose.tilt)];
  // Tilt about an axis in the picture's plane (Rodrigues), after the roll; only x and y of the label count.
  const t00 = cosTilt + cosAxis * cosAxis * (1 - cosTilt);
  const t01 = cosAxis * sinAxis * (1 - cosTilt);
  const t11 = cosTilt + sinAxis * sinAxis * (1 - cosTilt);
  const [t20, t21] = [-sinAxis * sinTilt, cosAxis * sinTilt];
  const r00 = t00 * cosRoll + t01 * sinRoll;
  const r01 = -t00 * sinRoll + t01 * cosRoll;
  const r10 = t01 * cosRoll + t11 * sinRoll;
  const r11 = -t01 * sinRoll + t11 * cosRoll;
  const r20 = t20 * cosRoll + t21 * sinRoll;
  const r21 = -t20 * sinRoll + t21 * cosRoll;
  const depth = FOCAL / pose.pxPerMm;
  return (u, v, out) => {
    const [a, b] = [u - pose.atX, v - pose.atY];
    const [m00, m01] = [FOCAL * r00 - a * r20, FOCAL * r01 - a * r21];
    const [m10, m11] = [FOCAL * r10 - b * r20, FOCAL * r11 - b * r21];
    const determinant = m00 * m11 - m01 * m10;
    if (Math.abs(determinant) < 1e-9) return false;
    out[0] = (a * depth * m11 - m01 * b * depth) / determinant;
    out[1] = (m00 * b * depth - a * depth * m10) / determinant;
    return depth + r20 * out[0] + r21 * out[1] > 0;
  };
}

/** The label lies on a sack: grey, uneven, with folds. */
export function seen(scene: Scene, random: Random): Light {
  const { face, pose, surface, ink, paper } = scene;
  const light = new Float32Array(WIDTH * HEIGHT);
  const look = lookFrom(pose);
  const noise = smoothNoise(random);
  const [ground, folds] = [random.between(0.2, 0.5), random.between(0.1, 0.3)];
  const middleX = face.symbol
    ? face.symbol.leftMm + face.symbol.sideMm / 2
    : face.width / face.pxPerMm / 2;
  const middleY = face.symbol
    ? face.symbol.topMm + face.symbol.sideMm / 2
    : face.height / face.pxPerMm / 2;
  const place = new Float64Array(2);
  for (let row = 0; row < HEIGHT; row += 1) {
    for (let column = 0; column < WIDTH; column += 1) {
      let sum = 0;
      const behind = ground + folds * (noise(column / 40, row / 40) - 0.5);
      for (let sub = 0; sub < SUB * SUB; sub += 1) {
        const u = column + ((sub % SUB) + 0.5) / SUB;
        const v = row + (Math.floor(sub / SUB) + 0.5) / SUB;
        const inFront = look(u, v, place);
        let [x, y, shade] = [place[0] ?? 0, place[1] ?? 0, 1];
        if (surface) {
          const bent = surface(x, y);
          x += bent.dxMm;
          y += bent.dyMm;
          shade = bent.shade;
        }
        const px = Math.floor((x + middleX) * face.pxPerMm);
        const py = Math.floor((y + middleY) * face.pxPerMm);
        if (inFront && px >= 0 && py >= 0 && px < face.width && py < face.height) {
          const white = (face.pixels[py * face.width + px] ?? 255) / 255;
          sum += (ink + (paper - ink) * white) * shade;
        } else {
          sum += behind;
        }
      }
      light[row * WIDTH + column] = sum / (SUB * SUB);
    }
  }
  return light;
}
