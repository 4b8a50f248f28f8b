/** Log lines: one JSON object a line, on standard output; errors on standard error. */

type Fields = Readonly<Record<string, string | number | boolean | null | undefined>>;

function write(stream: NodeJS.WriteStream, level: string, event: string, fields: Fields): void {
  stream.write(`${JSON.stringify({ at: new Date().toISOString(), level, event, ...fields })}\n`);
}

export const log = {
  info: (event: string, fields: Fields = {}) => write(process.stdout, "info", event, fields),
  warn: (event: string, fields: Fields = {}) => write(process.stdout, "warn", event, fields),
  /** The cause's message and stack are logged and never shown to a person. */
  error: (event: string, cause: unknown, fields: Fields = {}) =>
    write(process.stderr, "error", event, {
      ...fields,
      cause: cause instanceof Error ? (cause.stack ?? cause.message) : String(cause),
    }),
};
