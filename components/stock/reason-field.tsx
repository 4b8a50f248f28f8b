import { TextField } from "@/components/ui/text-field";

type Props = {
  value: string;
  onValue: (value: string) => void;
  error: string | undefined;
  asked: boolean;
};

/** Why something is corrected: it stands in the history beside the names. */
export function ReasonField({ value, onValue, error, asked }: Props) {
  const short = asked && value.trim().length < 3;
  return (
    <TextField
      label="Why is it corrected?"
      hint="It stands in the history of everything that it touches."
      maxLength={500}
      value={value}
      onChange={(event) => onValue(event.target.value)}
      error={error ?? (short ? "Say it in a few words." : undefined)}
    />
  );
}
