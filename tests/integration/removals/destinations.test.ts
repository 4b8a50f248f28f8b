import { describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import { day } from "@/lib/core/time";
import {
  addDestination,
  changeDestination,
  restoreDestination,
  retireDestination,
} from "@/lib/removals/commands/destinations";
import { addDestinationEndpoint, wasteCodeSchema } from "@/lib/removals/contract/destinations";
import { listDestinations, listManagedDestinations } from "@/lib/removals/queries/destinations";
import { commandCases, refusalOf } from "@/tests/support/command-cases";
import { newScheme, NOON, type TestScheme } from "@/tests/support/scheme";

const data = (name: string) => ({
  name,
  route: "passed-on" as const,
  receiverNumber: "REG/1",
  carrierName: "Estuary Carriers",
  carrierNumber: "CB/77",
  permitUntil: day("2027-03-31"),
  wasteCode: "19 12 04",
});

function added(scheme: TestScheme, name: string) {
  const input = { requestId: newId(), ...data(name) };
  return addDestination(scheme.ctx("coordinator", NOON, input), input);
}

describe("addDestination", () => {
  commandCases({
    command: addDestination,
    by: "coordinator",
    notBy: "lead",
    input: () => ({ requestId: newId(), ...data("Quay Recycling") }),
    does: (scheme, answer, { requestId }) => {
      expect(answer).toEqual({ id: requestId, ...data("Quay Recycling"), retiredAt: null });
      expect(listDestinations(scheme.ctx("volunteer")).items).toEqual([answer]);
    },
    wrongState: (scheme) => {
      added(scheme, "Quay Recycling");
      return {
        input: { requestId: newId(), ...data("quay  recycling") },
        code: "name-in-use",
      };
    },
    action: "destinations.add",
  });
});

describe("changeDestination", () => {
  commandCases({
    command: changeDestination,
    by: "coordinator",
    notBy: "volunteer",
    input: (scheme) => ({
      requestId: newId(),
      destinationId: added(scheme, "Quay Recycling").id,
      ...data("Quay Recycling Ltd"),
      wasteCode: "15 01 02",
    }),
    does: (_, answer) =>
      expect(answer).toMatchObject({ name: "Quay Recycling Ltd", wasteCode: "15 01 02" }),
    wrongState: () => ({
      input: { requestId: newId(), destinationId: newId<"destination">(), ...data("Gone") },
      code: "not-found",
    }),
    action: "destinations.change",
  });
});

describe("retireDestination", () => {
  commandCases({
    command: retireDestination,
    by: "coordinator",
    notBy: "lead",
    input: (scheme) => ({ requestId: newId(), destinationId: added(scheme, "Quay").id }),
    does: (scheme, answer) => {
      expect(answer.retiredAt).toBe(NOON);
      expect(listDestinations(scheme.ctx("lead")).items).toEqual([]);
      expect(listManagedDestinations(scheme.ctx())).toEqual([answer]);
    },
    wrongState: () => ({
      input: { requestId: newId(), destinationId: newId<"destination">() },
      code: "not-found",
    }),
    action: "destinations.retire",
  });
});

describe("restoreDestination", () => {
  commandCases({
    command: restoreDestination,
    by: "coordinator",
    notBy: "lead",
    input: (scheme) => {
      const { id } = added(scheme, "Quay");
      const retire = { requestId: newId(), destinationId: id };
      retireDestination(scheme.ctx("coordinator", NOON, retire), retire);
      return { requestId: newId(), destinationId: id };
    },
    does: (_, answer) => expect(answer.retiredAt).toBeNull(),
    wrongState: () => ({
      input: { requestId: newId(), destinationId: newId<"destination">() },
      code: "not-found",
    }),
    action: "destinations.restore",
  });
});

describe("codes of the List of Waste", () => {
  // fixtures: the codes of plastics that Decision 2000/532/EC has, with and without spaces.
  it.each([
    ["200139", "20 01 39"],
    [" 15 01 02 ", "15 01 02"],
    ["17 02 04*", "17 02 04*"],
    ["", ""],
  ])("reads %j as %j", (typed, stored) => {
    expect(wasteCodeSchema.parse(typed)).toBe(stored);
  });

  it.each(["20 01", "2001390", "20 01 3x", "* 20 01 39", "plastics"])("refuses %j", (typed) => {
    const read = addDestinationEndpoint.input.safeParse({
      requestId: newId(),
      ...data("Quay"),
      wasteCode: typed,
    });
    expect(read.error?.issues).toMatchObject([
      { path: ["wasteCode"], message: "not-a-waste-code" },
    ]);
  });

  it("are not for donors to see", () => {
    const scheme = newScheme();
    try {
      expect(refusalOf(() => listDestinations(scheme.ctx("donor")))).toBe("forbidden");
    } finally {
      scheme.close();
    }
  });
});
