"use client";

import { useCallback, useState } from "react";
import { useWedge } from "@/components/scanner/use-wedge";
import { ActionBar } from "@/components/ui/action-bar";
import { Button } from "@/components/ui/button";
import { Icon } from "@/components/ui/icon";
import { Late } from "@/components/ui/late";
import { Notice } from "@/components/ui/notice";
import { SelectField } from "@/components/ui/select-field";
import { Ticket } from "@/components/ui/ticket";
import { formatCode, readScan } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import type { Instant } from "@/lib/core/time";
import { whenWords } from "@/lib/weighing/rules";
import { MOST_READINGS } from "@/lib/weighing/terms";
import { AnswerFields } from "./answer-fields";
import { BagPhotos, type PhotoColour } from "./bag-photos";
import { drawnWords } from "./bag-words";
import { CodeArea } from "./code-area";
import { focusField } from "./focus-field";
import { emptyReading } from "./form-values";
import { InstrumentFields } from "./instrument-fields";
import { CODE_SENTENCES, readingRefusal } from "./read-form";
import { rememberScale } from "./remembered-scale";
import { SaidNotice } from "./said-notice";
import type { DeskLists } from "./use-desk-lists";
import { useReader } from "./use-reader";
import { useScanned, useSettledScan } from "./use-scanned";
import { useSettled } from "./use-settled";
import type { WeighInForm } from "./use-weigh-in";
import { WeightArea } from "./weight-area";

/** Parts that a first bag with a typed code needs none of. */
const loadCamera = async () => (await import("@/components/scanner/camera-view")).CameraView;
const loadSpareTag = async () => (await import("./spare-tag-dialog")).SpareTagDialog;
const loadAsk = async () => (await import("./ask-dialog")).AskDialog;

type Props = {
  weighIn: WeighInForm;
  lists: DeskLists;
  zone: string;
  /** Whose session this is; null until the server said. */
  helperId: string | null;
  /** How many bags were weighed in today; null while that is not known. */
  bagsToday: number | null;
  cameraOn: boolean;
  onCamera(on: boolean): void;
};

/** The form of one bag, from the tag to the save button under the thumb. */
export function WeighInFields({
  weighIn,
  lists,
  zone,
  helperId,
  bagsToday,
  cameraOn,
  onCamera,
}: Props) {
  const { form, scale, netGrams, pending, said, asking } = weighIn;
  const [spareOpen, setSpareOpen] = useState(false);
  const [fresh, setFresh] = useState(0);
  const [photoColour, setPhotoColour] = useState<PhotoColour | null>(null);
  const { values, problems } = form;
  const reader = useReader(form, lists);
  const scanned = useScanned(values.code);
  const settledScan = useSettledScan(values.code, scanned);
  useWedge(reader.take);
  const message = (name: string): string | undefined => problems[name];

  const at = values.readings.length - 1;
  const reading = values.readings[at] ?? emptyReading();
  const settled = useSettled(reading, 700);
  const refusal = settled === reading ? readingRefusal(reading, lists.containers, scale) : null;
  const bag = scanned.data?.kind === "bag" ? scanned.data : null;
  const closeCamera = useCallback(() => onCamera(false), [onCamera]);

  /** After saving: the camera goes on, else the code field waits for a hand scanner or for fingers. */
  const ready = (saved: boolean) => {
    if (!saved) return;
    reader.clearNote();
    window.scrollTo({ top: 0 });
    if (!cameraOn) focusField("code");
  };
  const startOver = () => {
    weighIn.startOver();
    reader.clearNote();
    setFresh((count) => count + 1);
  };
  const addReading = () => {
    form.addReading();
    setTimeout(() => focusField(`readings.${at + 1}.gross`));
  };

  return (
    <form
      id="weigh-in"
      noValidate
      className="flex grow flex-col"
      onSubmit={(event) => {
        event.preventDefault();
        void weighIn.save().then(ready);
      }}
    >
      <SaidNotice said={said} zone={zone} />
      <Late
        load={loadCamera}
        given={
          cameraOn
            ? {
                onRead: reader.take,
                settled: settledScan,
                onTrouble: closeCamera,
                fresh,
                bagsToday,
              }
            : null
        }
      />
      {reader.note ? (
        <p role="status" className="mb-2 font-bold">
          {reader.note}
        </p>
      ) : null}
      <Ticket
        stub={
          <CodeArea
            text={values.code}
            onText={(text) => {
              form.set({ code: text });
              reader.clearNote();
            }}
            onEnter={(text) => {
              if (readScan(text) !== null) reader.take(text);
              else {
                const short = text.replace(/[\s-]/g, "").length < 8;
                form.say({ code: short ? CODE_SENTENCES.short : CODE_SENTENCES.wrong });
              }
            }}
            scanned={scanned}
            error={message("code")}
            zone={zone}
            onSpare={() => setSpareOpen(true)}
          />
        }
      >
        <WeightArea
          readings={values.readings}
          listed={lists.containers}
          netGrams={netGrams}
          onGross={(gross) => form.setReading(at, { gross })}
          onRemove={form.removeReading}
          error={message(`readings.${at}.gross`) ?? refusal}
        />
      </Ticket>
      {bag?.weighIn ? (
        <Notice tone="warn" title="Weighed already" live="status" className="mt-3">
          By {bag.weighIn.who} on {whenWords(bag.weighIn.when as Instant, zone)}:{" "}
          {formatKg(bag.weighIn.netGrams)} kg. A second reading is kept for review and does not
          count.
        </Notice>
      ) : null}
      <InstrumentFields
        at={at}
        reading={reading}
        lists={lists}
        scaleId={values.scaleId}
        message={message}
        onTare={(part, value) => form.setReading(at, { [part]: value })}
        onScale={(id) => {
          form.set({ scaleId: id });
          form.forgive("readings");
          rememberScale(id);
        }}
        onAddReading={values.readings.length < MOST_READINGS ? addReading : null}
        onStartOver={weighIn.touched ? startOver : null}
      />
      {bag && bag.point === null ? (
        <SelectField
          label="Where is this bag from?"
          hint="Its tag belongs to no drop-off point yet."
          name="pointId"
          className="mt-3"
          value={values.pointId}
          onChange={(event) => form.set({ pointId: event.target.value })}
          placeholder="Not known"
          options={lists.points
            .filter(({ kind }) => kind !== "not-known")
            .map(({ id, name }) => ({ value: id, label: name }))}
          error={message("pointId")}
        />
      ) : null}
      <AnswerFields
        weighIn={weighIn}
        colours={lists.colours}
        photos={
          <BagPhotos
            key={values.id}
            form={form}
            netGrams={netGrams}
            zone={zone}
            helperId={helperId}
            onColour={setPhotoColour}
          />
        }
        middle={photoColour?.id === values.id ? photoColour.middle : null}
      />
      <div className="h-4" />
      <ActionBar>
        <Button
          variant="quiet"
          aria-label={cameraOn ? "Stop the camera" : "Scan with the camera"}
          aria-pressed={cameraOn}
          onClick={() => onCamera(!cameraOn)}
          className="w-14 shrink-0 px-0!"
        >
          <Icon name={cameraOn ? "close" : "camera"} />
        </Button>
        <Button type="submit" busy={pending} className="grow">
          {netGrams !== null && netGrams > 0
            ? `Save ${formatKg(netGrams)} kg, next bag`
            : "Save, next bag"}
        </Button>
      </ActionBar>
      <Late
        load={loadSpareTag}
        given={
          spareOpen
            ? {
                points: lists.points,
                onClose: () => setSpareOpen(false),
                onTag: (code, drawn) => {
                  setSpareOpen(false);
                  reader.take(code);
                  if (drawn) reader.say(drawnWords(code));
                },
              }
            : null
        }
      />
      <Late
        load={loadAsk}
        given={
          asking
            ? {
                asking,
                onYes: () => void weighIn.confirm().then(ready),
                onNo: weighIn.notNow,
                pending,
                zone,
              }
            : null
        }
      />
      <span className="sr-only" aria-live="polite">
        {pending ? `Saving ${formatCode(values.code)}` : ""}
      </span>
    </form>
  );
}
