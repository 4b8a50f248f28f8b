"use client";

import { rememberedScale } from "../weighing/remembered-scale";
import { useDeskLists, type DeskLists } from "../weighing/use-desk-lists";

/** The lists of a weighing, and the scale beside this device: the remembered one, else the first. */
export function useBinDesk(): { lists: DeskLists; scaleId: string } {
  const lists = useDeskLists();
  const remembered = rememberedScale();
  const scale = lists.scales.find(({ id }) => id === remembered) ?? lists.scales[0];
  return { lists, scaleId: scale?.id ?? "" };
}
