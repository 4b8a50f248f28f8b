import Link, { type LinkProps } from "next/link";
import type { ReactNode } from "react";
import { buttonStyle, type ButtonSize, type ButtonVariant } from "./button-style";

type ButtonLinkProps<RouteType> = {
  href: LinkProps<RouteType>["href"];
  variant?: ButtonVariant;
  size?: ButtonSize;
  className?: string;
  children: ReactNode;
};

/** A link that looks like a button: for going somewhere, never for doing something. */
export function ButtonLink<RouteType>({
  href,
  variant = "act",
  size = "large",
  className,
  children,
}: ButtonLinkProps<RouteType>) {
  return (
    <Link href={href} className={buttonStyle(variant, size, className)}>
      {children}
    </Link>
  );
}
