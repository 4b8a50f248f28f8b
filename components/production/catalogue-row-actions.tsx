import type { ReactNode } from "react";
import { Button } from "@/components/ui/button";

type Props = {
  name: string;
  onChange: () => void;
  onRetire: () => void;
  /** Another action, before the others. */
  children?: ReactNode;
};

/** What can be done with one entry of the catalogue. Retiring asks first, because nothing brings it back. */
export function CatalogueRowActions({ name, onChange, onRetire, children }: Props) {
  return (
    <span className="-mr-2 flex flex-wrap items-center justify-end wide:flex-nowrap">
      {children}
      <Button variant="link" size="small" aria-label={`Change ${name}`} onClick={onChange}>
        Change
      </Button>
      <Button variant="link" size="small" aria-label={`Retire ${name}`} onClick={onRetire}>
        Retire
      </Button>
    </span>
  );
}
