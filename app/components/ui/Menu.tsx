import { type KeyboardEvent, type ReactNode, useEffect, useRef } from "react";
import { useLocation } from "react-router";
import { Icon, type IconName } from "./Icon";

export interface MenuProps {
  label: string;
  icon?: IconName;
  /** On a phone the icon alone is shown. */
  terse?: boolean;
  /** Which edge of the label the list hangs from. */
  align?: "start" | "end";
  /** Links, and forms with one button each. */
  children: ReactNode;
}

const FOCUSABLE = "a[href], button:not([disabled])";

/** A list that unfolds under its label; opens without JavaScript. Arrow keys walk it, Escape closes it. */
export function Menu({ label, icon, terse = false, align = "start", children }: MenuProps) {
  const details = useRef<HTMLDetailsElement>(null);
  const location = useLocation();
  // biome-ignore lint/correctness/useExhaustiveDependencies: going somewhere closes the menu
  useEffect(() => close(details.current), [location.key]);
  useEffect(() => {
    const closeOutside = (event: Event) => {
      if (!details.current?.contains(event.target as Node)) close(details.current);
    };
    document.addEventListener("pointerdown", closeOutside);
    document.addEventListener("focusin", closeOutside);
    return () => {
      document.removeEventListener("pointerdown", closeOutside);
      document.removeEventListener("focusin", closeOutside);
    };
  }, []);
  return (
    <details ref={details} className={terse ? "menu menu-terse" : "menu"} onKeyDown={walk}>
      <summary className="menu-label">
        {icon && <Icon name={icon} />}
        <span className="menu-words">{label}</span>
        <Icon name="down" size={14} />
      </summary>
      <div className={`menu-list menu-${align}`}>{children}</div>
    </details>
  );
}

function walk(event: KeyboardEvent<HTMLDetailsElement>) {
  const details = event.currentTarget;
  if (event.key === "Escape" && details.open) {
    close(details);
    details.querySelector("summary")?.focus();
    return;
  }
  if (event.key !== "ArrowDown" && event.key !== "ArrowUp") return;
  event.preventDefault();
  details.open = true;
  const items = [...details.querySelectorAll<HTMLElement>(FOCUSABLE)];
  const at = items.indexOf(document.activeElement as HTMLElement);
  const step = event.key === "ArrowDown" ? 1 : -1;
  items[(at + step + items.length) % items.length]?.focus();
}

function close(details: HTMLDetailsElement | null) {
  if (details?.open) details.open = false;
}
