/**
 * What the weigh-in page reads, by address alone: contracts carry zod, which this page does not send to a
 * phone. A test compares each with its contract.
 */
import type { giveSpareTagEndpoint } from "@/lib/bags/contract";
import type { listPointsEndpoint } from "@/lib/points/contract";
import type { listContainersEndpoint } from "@/lib/scales/contract/containers";
import type { listScalesEndpoint } from "@/lib/scales/contract/scales";
import type { listColoursEndpoint } from "@/lib/stock/contract/palette";
import type { AddressOf } from "../forms/fetch-endpoint";

export const POINTS: AddressOf<typeof listPointsEndpoint> = { method: "GET", path: "/api/points" };
export const SCALES: AddressOf<typeof listScalesEndpoint> = { method: "GET", path: "/api/scales" };
export const CONTAINERS: AddressOf<typeof listContainersEndpoint> = {
  method: "GET",
  path: "/api/containers",
};
export const COLOURS: AddressOf<typeof listColoursEndpoint> = {
  method: "GET",
  path: "/api/colours",
};
export const SPARE_TAG: AddressOf<typeof giveSpareTagEndpoint> = {
  method: "POST",
  path: "/api/bags/spare",
};
