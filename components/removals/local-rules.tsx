/** Stands wherever plastic waste leaves. */
export function LocalRules() {
  return (
    <p className="text-sm text-soft">
      What leaves here is waste under most local rules: only a licensed carrier takes it, and only
      to a receiver that may have it. Keep their papers; your local rules come first.
    </p>
  );
}
