/** The scale that stands beside this device: a setting of the device, not of a person. */
const KEY = "bismar-scale";

export function rememberedScale(): string {
  try {
    return localStorage.getItem(KEY) ?? "";
  } catch {
    return "";
  }
}

export function rememberScale(id: string): void {
  try {
    localStorage.setItem(KEY, id);
  } catch {
    // Without storage it is chosen again next time.
  }
}
