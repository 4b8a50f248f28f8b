/**
 * Flakes: irregular chips of plastic, drawn from a seed. The same seed gives the same picture on the server
 * and in the browser, on every run.
 */

/**
 * One chip as SVG path data, whole units.
 *
 * Five to seven corners around a stretched circle; one chip in three has a corner pushed in, as shredders
 * leave them.
 *
 * @param x centre
 * @param y centre
 * @param size about half its length
 */
export function chipPath(random: () => number, x: number, y: number, size: number): string {
  const corners = 5 + Math.floor(random() * 3);
  const turn = random() * Math.PI * 2;
  const stretch = 0.62 + random() * 0.38;
  const tilt = random() * Math.PI;
  const dent = random() < 0.34 ? Math.floor(random() * corners) : -1;
  const cos = Math.cos(tilt);
  const sin = Math.sin(tilt);
  let path = "";
  let lastX = 0;
  let lastY = 0;
  for (let corner = 0; corner < corners; corner += 1) {
    const angle = turn + ((corner + (random() - 0.5) * 0.75) / corners) * Math.PI * 2;
    const reach = size * (corner === dent ? 0.3 + random() * 0.2 : 0.78 + random() * 0.3);
    const alongX = Math.cos(angle) * reach;
    const alongY = Math.sin(angle) * reach * stretch;
    const atX = Math.round(x + alongX * cos - alongY * sin);
    const atY = Math.round(y + alongX * sin + alongY * cos);
    if (corner === 0) path += `M${atX} ${atY}l`;
    else
      path += `${corner > 1 && atX - lastX >= 0 ? " " : ""}${atX - lastX}${atY - lastY < 0 ? "" : " "}${atY - lastY}`;
    lastX = atX;
    lastY = atY;
  }
  return `${path}z`;
}

/** Diagonal bars over a box, as path data for a stroke: the mark of what is reserved or rejected. */
export function hatchPath(width: number, height: number, step: number): string {
  let path = "";
  for (let at = -height; at < width; at += step) path += `M${at} ${height}l${height} ${-height}`;
  return path;
}
