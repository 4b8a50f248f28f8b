"use client";

import { useMemo, useRef, useState } from "react";
import { emptyReading, nextForm, type FormValues, type ReadingValue } from "./form-values";
import type { Problems } from "./read-form";

/**
 * The typed ticket and its sentences by field. It is this small because the weigh-in page must load on a slow
 * phone: react-hook-form, which the desk's other forms use, would be a quarter of what the page may send.
 */
export function useTicketForm(first?: () => FormValues) {
  const [values, setValues] = useState<FormValues>(first ?? (() => nextForm("")));
  const [problems, setProblems] = useState<Problems>({});
  // What is typed is read again after waits (a scan, an answer), when a render's own copy would be old.
  const latest = useRef(values);

  const actions = useMemo(() => {
    const keep = (next: FormValues) => {
      latest.current = next;
      setValues(next);
    };
    const forgive = (...fields: string[]) =>
      setProblems((known) =>
        Object.fromEntries(
          Object.entries(known).filter(
            ([name]) => !fields.some((field) => name === field || name.startsWith(`${field}.`)),
          ),
        ),
      );
    return {
      get: () => latest.current,
      /** Sets fields, and takes back what was said of them. */
      set: (fields: Partial<FormValues>) => {
        keep({ ...latest.current, ...fields });
        forgive(...Object.keys(fields));
      },
      setReading: (at: number, fields: Partial<ReadingValue>) => {
        const readings = latest.current.readings.map((reading, index) =>
          index === at ? { ...reading, ...fields } : reading,
        );
        keep({ ...latest.current, readings });
        forgive(`readings.${at}`);
      },
      addReading: () => {
        const { readings } = latest.current;
        keep({
          ...latest.current,
          readings: [...readings, emptyReading(readings[readings.length - 1])],
        });
      },
      removeReading: (at: number) => {
        const readings = latest.current.readings.filter((_, index) => index !== at);
        keep({ ...latest.current, readings });
        forgive("readings");
      },
      reset: (next: FormValues) => {
        keep(next);
        setProblems({});
      },
      say: setProblems,
      forgive,
    };
  }, []);

  return useMemo(() => ({ values, problems, ...actions }), [values, problems, actions]);
}

export type TicketForm = ReturnType<typeof useTicketForm>;
