import type { ComponentProps } from "react";
import { buttonStyle, type ButtonSize, type ButtonVariant } from "./button-style";

type ButtonAnchorProps = ComponentProps<"a"> & { variant?: ButtonVariant; size?: ButtonSize };

/** A plain link in a button's clothes: for downloads, and for leaving by a full load of the page. */
export function ButtonAnchor({ variant, size, className, ...anchor }: ButtonAnchorProps) {
  return <a {...anchor} className={buttonStyle(variant, size, className)} />;
}
