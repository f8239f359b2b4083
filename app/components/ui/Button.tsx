import type { ButtonHTMLAttributes, ReactNode } from "react";
import { Link, type LinkProps } from "react-router";
import { Icon, type IconName } from "./Icon";

interface Look {
  /** primary: the one thing to do here; quiet: everything else; danger: destroys something. */
  variant?: "primary" | "quiet" | "danger";
  size?: "base" | "small";
  icon?: IconName;
}

export interface ButtonProps extends Look, ButtonHTMLAttributes<HTMLButtonElement> {
  /** Work is under way: the label stays, a moving line shows it, a second press does nothing. */
  busy?: boolean;
  children: ReactNode;
}

export function Button(props: ButtonProps) {
  const { variant = "primary", size = "base", icon, busy = false, className, children, ...rest } = props;
  return (
    <button
      type="submit"
      {...rest}
      className={look({ variant, size }, className)}
      aria-busy={busy || undefined}
      onClick={busy ? (event) => event.preventDefault() : rest.onClick}
    >
      {icon && <Icon name={icon} />}
      {children}
    </button>
  );
}

export interface LinkButtonProps extends Look, LinkProps {
  children: ReactNode;
}

/** A link that looks like a button, for what takes a person somewhere. */
export function LinkButton(props: LinkButtonProps) {
  const { variant = "primary", size = "base", icon, className, children, ...rest } = props;
  return (
    <Link {...rest} className={look({ variant, size }, className)}>
      {icon && <Icon name={icon} />}
      {children}
    </Link>
  );
}

function look({ variant, size }: Required<Omit<Look, "icon">>, more = ""): string {
  return `button button-${variant} ${size === "small" ? "button-small" : ""} ${more}`.trim();
}
