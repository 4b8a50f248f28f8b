"use client";

import { useState, type ReactNode } from "react";
import { CheckField } from "@/components/ui/check-field";
import { TextField } from "@/components/ui/text-field";

type PasswordFieldProps = {
  name: string;
  label: string;
  /** "new-password" lets a password manager offer one. */
  autoComplete: "current-password" | "new-password";
  hint?: ReactNode;
  error?: ReactNode;
  required?: boolean;
};

/** A password that can be looked at while typing: with gloves on, one mistypes. */
export function PasswordField(field: PasswordFieldProps) {
  const [shown, setShown] = useState(false);
  return (
    <div className="flex flex-col">
      <TextField
        {...field}
        type={shown ? "text" : "password"}
        autoCapitalize="none"
        autoCorrect="off"
        spellCheck={false}
      />
      <CheckField
        label="Show what I type"
        aria-label={`Show what I type as ${field.label.toLowerCase()}`}
        checked={shown}
        onChange={(event) => setShown(event.target.checked)}
      />
    </div>
  );
}
