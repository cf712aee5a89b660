"use client";

import { useState } from "react";
import { Slot } from "@/components/ui/slot";
import { themeCookie, type ThemeChoice } from "./theme";

const choices: readonly { value: ThemeChoice; label: string }[] = [
  { value: "system", label: "As the device" },
  { value: "light", label: "Paper" },
  { value: "dark", label: "Microfiche" },
];

function keep(choice: ThemeChoice) {
  const root = document.documentElement;
  if (choice === "system") delete root.dataset.theme;
  else root.dataset.theme = choice;
  const age = choice === "system" ? 0 : 31536000;
  document.cookie = `${themeCookie}=${choice}; Path=/; Max-Age=${age}; SameSite=Lax`;
}

/** Paper or microfiche; kept in a cookie that the server reads, so that no page flashes. */
export function ThemeSwitch({ start }: { start: ThemeChoice }) {
  const [choice, setChoice] = useState(start);
  return (
    <fieldset className="flex flex-wrap gap-x-5 gap-y-0">
      <legend className="sr-only">Print on</legend>
      {choices.map(({ value, label }) => (
        <Slot
          key={value}
          type="radio"
          name="theme-choice"
          value={value}
          label={label}
          checked={choice === value}
          onChange={() => {
            setChoice(value);
            keep(value);
          }}
        />
      ))}
    </fieldset>
  );
}
