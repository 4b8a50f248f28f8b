import type { ComponentProps } from "react";
import { buttonStyle, type ButtonSize, type ButtonVariant } from "./button-style";

type ButtonProps = ComponentProps<"button"> & {
  variant?: ButtonVariant;
  size?: ButtonSize;
  /** Working on it: says so to a screen reader and does not take a second press. */
  busy?: boolean;
};

/** A button whose words say what it will do. One `act` button a screen; 56 px high on phones. */
export function Button({
  variant = "act",
  size = "large",
  busy = false,
  type = "button",
  className,
  onClick,
  ...rest
}: ButtonProps) {
  return (
    <button
      {...rest}
      type={type}
      // Not `disabled` while busy: that would drop the focus of whoever pressed it with a key.
      aria-disabled={busy || undefined}
      aria-busy={busy || undefined}
      onClick={
        busy
          ? (event) => {
              event.preventDefault();
            }
          : onClick
      }
      className={buttonStyle(variant, size, className)}
    />
  );
}
