/** What light, lens, sensor and shed do to a picture of a label. All in place, on {@link Light}. */
import { smoothNoise, type Random } from "./random";
import { HEIGHT, WIDTH, type Light } from "./view";

/** A Gaussian of this deviation in pixels, as two passes. */
export function blur(light: Light, sigma: number): void {
  const reach = Math.max(1, Math.ceil(sigma * 3));
  const weights = Array.from({ length: 2 * reach + 1 }, (_, at) =>
    Math.exp(-((at - reach) ** 2) / (2 * sigma * sigma)),
  );
  const total = weights.reduce((a, b) => a + b, 0);
  const copy = new Float32Array(light.length);
  const pass = (from: Light, to: Light, step: number, along: number, most: number) => {
    for (let at = 0; at < from.length; at += 1) {
      const place = along === 1 ? at % WIDTH : (at / WIDTH) | 0;
      let sum = 0;
      for (let tap = -reach; tap <= reach; tap += 1) {
        const wanted = place + tap;
        const clamped = wanted < 0 ? 0 : wanted > most ? most : wanted;
        sum += (from[at + (clamped - place) * step] ?? 0) * (weights[tap + reach] ?? 0);
      }
      to[at] = sum / total;
    }
  };
  pass(light, copy, 1, 1, WIDTH - 1);
  pass(copy, light, WIDTH, 0, HEIGHT - 1);
}

/** A stroke of this length in pixels in a direction, evenly weighed. */
export function smear(light: Light, length: number, angle: number): void {
  const copy = light.slice();
  const taps = Math.max(2, Math.ceil(length * 3));
  const [dx, dy] = [Math.cos(angle) * length, Math.sin(angle) * length];
  for (let row = 0; row < HEIGHT; row += 1) {
    for (let column = 0; column < WIDTH; column += 1) {
      let sum = 0;
      for (let tap = 0; tap < taps; tap += 1) {
        const along = tap / (taps - 1) - 0.5;
        sum += sampled(copy, column + dx * along, row + dy * along);
      }
      light[row * WIDTH + column] = sum / taps;
    }
  }
}

function sampled(light: Light, x: number, y: number): number {
  const [column, row] = [Math.floor(x), Math.floor(y)];
  const [right, down] = [x - column, y - row];
  const at = (c: number, r: number): number =>
    light[Math.min(HEIGHT - 1, Math.max(0, r)) * WIDTH + Math.min(WIDTH - 1, Math.max(0, c))] ?? 0;
  return (
    (at(column, row) * (1 - right) + at(column + 1, row) * right) * (1 - down) +
    (at(column, row + 1) * (1 - right) + at(column + 1, row + 1) * right) * down
  );
}

/** Light from one side: brighter there by up to `strength`, darker on the other. */
export function slope(light: Light, strength: number, angle: number): void {
  const [dx, dy] = [Math.cos(angle), Math.sin(angle)];
  for (let at = 0; at < light.length; at += 1) {
    const x = (at % WIDTH) / WIDTH - 0.5;
    const y = Math.floor(at / WIDTH) / HEIGHT - 0.5;
    light[at] = (light[at] ?? 0) * (1 + strength * (x * dx + y * dy));
  }
}

export type Patch = { x: number; y: number; areaPx: number };

/** A lamp's mirror image: an ellipse of much more light, with a soft rim. */
export function glare(light: Light, { x, y, areaPx }: Patch, random: Random): void {
  const longer = random.between(1, 2.2);
  const short = Math.sqrt(areaPx / (Math.PI * longer));
  const turn = random.between(0, Math.PI);
  const [cos, sin] = [Math.cos(turn), Math.sin(turn)];
  for (let at = 0; at < light.length; at += 1) {
    const [dx, dy] = [(at % WIDTH) - x, Math.floor(at / WIDTH) - y];
    const along = (dx * cos + dy * sin) / (short * longer);
    const across = (dy * cos - dx * sin) / short;
    // Washed out inside radius 1, half of it a fifth farther out.
    const r = along * along + across * across;
    light[at] = (light[at] ?? 0) + 1.6 / (1 + r ** 4);
  }
}

/** Splashes and crusts: uneven dark patches that together cover the area, ink and paper alike. */
export function dirt(light: Light, patches: readonly Patch[], random: Random): void {
  const edge = smoothNoise(random);
  const colour = random.between(0.12, 0.3);
  for (const { x, y, areaPx } of patches) {
    const radius = Math.sqrt(areaPx / Math.PI);
    const opaque = random.between(0.85, 1);
    for (let at = 0; at < light.length; at += 1) {
      const [dx, dy] = [(at % WIDTH) - x, Math.floor(at / WIDTH) - y];
      const distance = Math.hypot(dx, dy);
      if (distance > radius * 1.8) continue;
      const rim = radius * (0.7 + 0.6 * edge((at % WIDTH) / 9, Math.floor(at / WIDTH) / 9));
      const cover = opaque * Math.min(1, Math.max(0, (rim - distance) / 2 + 0.5));
      light[at] = (light[at] ?? 0) * (1 - cover) + colour * cover;
    }
  }
}

/** Drops of water: small bright spots beside small dark ones. */
export function drops(light: Light, { x, y, areaPx }: Patch, count: number, random: Random): void {
  const half = Math.sqrt(areaPx) / 2;
  for (let drop = 0; drop < count; drop += 1) {
    const [dropX, dropY] = [x + random.between(-half, half), y + random.between(-half, half)];
    const radius = random.between(2, 6);
    for (let row = -9; row <= 9; row += 1) {
      for (let column = -9; column <= 9; column += 1) {
        const distance = Math.hypot(column, row);
        const [c, r] = [Math.round(dropX) + column, Math.round(dropY) + row];
        if (distance > radius || c < 0 || r < 0 || c >= WIDTH || r >= HEIGHT) continue;
        const at = r * WIDTH + c;
        const shine = Math.hypot(column + radius * 0.4, row + radius * 0.4) < radius * 0.35;
        light[at] = shine ? 1.2 : (light[at] ?? 0) * 0.8;
      }
    }
  }
}

/**
 * The sensor: `exposure` of a good one, then gain. Shot noise grows with the root of the light, read noise
 * is always there; both are what gain makes visible.
 */
export function expose(light: Light, exposure: number, readNoise: number, random: Random): void {
  const wellElectrons = 4000;
  for (let at = 0; at < light.length; at += 1) {
    const electrons = Math.max(0, (light[at] ?? 0) * exposure * wellElectrons);
    const noisy = electrons + Math.sqrt(electrons) * random.normal() + readNoise * random.normal();
    light[at] = noisy / (exposure * wellElectrons);
  }
}

/** Adds noise of a deviation (of 1), a little of it shared with the neighbour as after demosaicing. */
export function grain(light: Light, deviation: number, random: Random): void {
  let before = random.normal();
  for (let at = 0; at < light.length; at += 1) {
    const now = random.normal();
    light[at] = (light[at] ?? 0) + deviation * (0.89 * now + 0.46 * before);
    before = now;
  }
}

/** Eight bits a pixel; what is too bright is white. */
export function develop(light: Light, white: number): Buffer {
  const pixels = Buffer.alloc(light.length);
  for (let at = 0; at < light.length; at += 1) {
    pixels[at] = Math.max(0, Math.min(255, Math.round(((light[at] ?? 0) / white) * 235)));
  }
  return pixels;
}
