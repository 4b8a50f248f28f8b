/** The refusals of one part of a form: "counted.readings.0.gross…" of "counted" is "readings.0.gross…". */
export function errorsUnder(
  errors: Readonly<Record<string, string>>,
  prefix: string,
): Readonly<Record<string, string>> {
  const start = `${prefix}.`;
  return Object.fromEntries(
    Object.entries(errors).flatMap(([field, said]) =>
      field.startsWith(start) ? [[field.slice(start.length), said]] : [],
    ),
  );
}
