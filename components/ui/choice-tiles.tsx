import { useId, type ComponentProps, type ReactNode } from "react";

export type Choice = {
  value: string;
  /** Read aloud and written small under `big` or the swatch; alone it is the tile's whole text. */
  label: string;
  /** Large mark above the label, such as a resin code. */
  big?: ReactNode;
  /** Colour strip over the whole upper part of the tile (a SwatchPaint). */
  swatch?: ReactNode;
  disabled?: boolean;
};

type ChoiceTilesProps = Omit<
  ComponentProps<"input">,
  "type" | "value" | "defaultValue" | "children" | "className" | "id"
> & {
  legend: ReactNode;
  hideLegend?: boolean;
  name: string;
  choices: readonly Choice[];
  /** Controlled: the chosen value, with `onChoose`. Leave both out and spread `register(name)` instead. */
  value?: string;
  defaultValue?: string;
  onChoose?: (value: string) => void;
  columns?: 2 | 3 | 4;
  hint?: ReactNode;
  error?: ReactNode;
  className?: string;
};

const COLUMNS = { 2: "grid-cols-2", 3: "grid-cols-3", 4: "grid-cols-4" } as const;

/**
 * One of a few answers, as tiles. They are native radio buttons of one name, so that arrow keys move
 * between them and Tab leaves the group.
 */
export function ChoiceTiles({
  legend,
  hideLegend = false,
  name,
  choices,
  value,
  defaultValue,
  onChoose,
  onChange,
  columns = 4,
  hint,
  error,
  className = "",
  ...input
}: ChoiceTilesProps) {
  const id = useId();
  const described = [hint ? `${id}-hint` : "", error ? `${id}-error` : ""]
    .filter(Boolean)
    .join(" ");
  return (
    <fieldset className={`min-w-0 ${className}`} aria-describedby={described || undefined}>
      <legend className={hideLegend ? "sr-only" : "mb-1.5 text-sm font-bold text-soft"}>
        {legend}
      </legend>
      {hint ? (
        <p id={`${id}-hint`} className="mb-1.5 text-sm text-soft">
          {hint}
        </p>
      ) : null}
      <div className={`grid gap-2 ${COLUMNS[columns]}`}>
        {choices.map((choice) => (
          <label
            key={choice.value}
            className="relative flex min-h-14 min-w-0 cursor-pointer flex-col overflow-hidden rounded-control border border-rule bg-card text-center has-checked:border-act has-checked:bg-act-soft has-checked:ring-2 has-checked:ring-act has-focus-visible:outline-3 has-focus-visible:outline-offset-3 has-focus-visible:outline-act has-disabled:cursor-not-allowed has-disabled:bg-well has-disabled:text-soft"
          >
            <input
              {...input}
              type="radio"
              name={name}
              value={choice.value}
              disabled={choice.disabled ?? input.disabled}
              {...(value === undefined
                ? { defaultChecked: defaultValue === choice.value }
                : { checked: value === choice.value })}
              // Only with a listener: without one the tiles can stand in a page made on the server.
              onChange={
                onChoose
                  ? (event) => {
                      onChange?.(event);
                      onChoose(choice.value);
                    }
                  : onChange
              }
              // It covers the tile: a touch or a pointer lands on the real radio button.
              className="absolute inset-0 size-full cursor-pointer appearance-none rounded-control outline-none disabled:cursor-not-allowed"
            />
            {choice.swatch ? (
              <span className="block h-8 w-full border-b border-rule">{choice.swatch}</span>
            ) : null}
            <span className="pointer-events-none flex grow flex-col items-center justify-center px-1 py-1">
              {choice.big === undefined ? null : (
                <span className="font-mono text-lg/6 font-bold text-ink">{choice.big}</span>
              )}
              <span
                className={
                  choice.big === undefined && !choice.swatch
                    ? "text-sm/5 font-bold hyphens-auto"
                    : `text-xs/4 font-bold hyphens-auto ${choice.big === undefined ? "text-ink" : "text-soft"}`
                }
              >
                {choice.label}
              </span>
            </span>
          </label>
        ))}
      </div>
      {error ? (
        <p id={`${id}-error`} className="mt-1.5 text-sm font-bold text-bad">
          {error}
        </p>
      ) : null}
    </fieldset>
  );
}
