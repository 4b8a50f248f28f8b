"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useRouter } from "next/navigation";
import { useTransition } from "react";
import { useForm } from "react-hook-form";
import * as z from "zod";
import { CommandNotice } from "@/components/forms/command-notice";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { SelectField } from "@/components/ui/select-field";
import { TextField } from "@/components/ui/text-field";
import { MOST_TAGS, orderTagsEndpoint, orderTagsSchema } from "@/lib/bags/contract";
import { fieldSentence } from "@/lib/core/messages";

/** Fields give text: the number by its digits, no point as an empty choice. */
const schema = z.object({
  count: z
    .string()
    .trim()
    .regex(/^\d{1,4}$/, "whole-number")
    .transform(Number)
    .pipe(orderTagsSchema.shape.count),
  pointId: z
    .string()
    .transform((id) => (id === "" ? null : id))
    .pipe(orderTagsSchema.shape.pointId),
});

type OrderFormProps = { points: readonly { id: string; name: string }[] };

/** Orders tags and goes on to print them. */
export function OrderForm({ points }: OrderFormProps) {
  const router = useRouter();
  const [leaving, startLeaving] = useTransition();
  const order = useCommand(orderTagsEndpoint);
  const { register, handleSubmit, formState } = useForm<
    z.input<typeof schema>,
    unknown,
    z.output<typeof schema>
  >({ resolver: zodResolver(schema), defaultValues: { count: "21", pointId: "" } });
  const send = handleSubmit(async (values) => {
    const result = await order.send(values);
    if (result.kind !== "done") return;
    const { id } = result.receipt;
    startLeaving(() => router.push(`/tags/${id}/print`));
  });
  const errorOf = (field: "count" | "pointId") => {
    const code = formState.errors[field]?.message;
    return code ? fieldSentence(code) : order.fieldErrors[field];
  };
  return (
    <form onSubmit={send} noValidate className="grid gap-4">
      <CommandNotice command={order} shownFields={["count", "pointId"]} />
      <TextField
        {...register("count")}
        label="How many"
        hint={`A sheet of A4 holds 21, US Letter 10 or 18; at most ${MOST_TAGS} at once.`}
        inputMode="numeric"
        autoComplete="off"
        mono
        error={errorOf("count")}
      />
      <SelectField
        {...register("pointId")}
        label="For which point"
        placeholder="None yet (spare tags)"
        options={points.map((point) => ({ value: point.id, label: point.name }))}
        error={errorOf("pointId")}
      />
      <Button type="submit" busy={order.pending || leaving}>
        Order and print
      </Button>
    </form>
  );
}
