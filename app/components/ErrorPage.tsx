import { isRouteErrorResponse, useLocation } from "react-router";
import type { PlainError } from "~/errors";
import { LinkButton } from "./ui/Button";
import { LostDrawing } from "./ui/drawings";

interface Words {
  title: string;
  text: string;
  action: { to: string; label: string };
}

const HOME = { to: "/", label: "Go to the front page" };

const WORDS: Record<number, Words> = {
  400: {
    title: "That request could not be understood",
    text: "Something in the address or the form was not what this page expects. Nothing was changed. Go back and try once more.",
    action: HOME,
  },
  401: {
    title: "Sign in to go on",
    text: "This page belongs to somebody. Sign in and you come back to it.",
    action: { to: "/sign-in", label: "Sign in" },
  },
  403: {
    title: "You may not do that here",
    text: "Your role in this project does not include it. Nothing was changed. An owner of the project can give you another role.",
    action: { to: "/projects", label: "Go to your projects" },
  },
  404: {
    title: "There is nothing at this address",
    text: "It may have been removed, it may be private, or the address may be mistyped. If it was shared with you, ask for it again.",
    action: HOME,
  },
  413: {
    title: "That file is too large",
    text: "A file may have up to 64 MB. Nothing was stored. Sweep a shorter span or fewer points and send that.",
    action: HOME,
  },
  429: {
    title: "Too many requests just now",
    text: "Wait a minute and try again. Nothing was lost.",
    action: HOME,
  },
  500: {
    title: "Something went wrong on our side",
    text: "What was stored before is safe. Load the page again; if it happens twice, tell whoever runs this service.",
    action: HOME,
  },
};

/** What a person reads when a page cannot be shown: what happened, what is safe, what to do. */
export function ErrorPage({ error }: { error: unknown }) {
  const { pathname, search } = useLocation();
  const status = isRouteErrorResponse(error) ? error.status : 500;
  const words = WORDS[status] ?? (status < 500 ? WORDS[400] : WORDS[500]);
  const said = isRouteErrorResponse(error) && (status < 500 || status === 503) ? saidBy(error.data) : {};
  const title = said.title ?? words.title;
  const action = said.signIn
    ? { to: `/sign-in?next=${encodeURIComponent(pathname + search)}`, label: "Sign in" }
    : words.action;
  return (
    <section className="error-page">
      <title>{`${title} · Swale`}</title>
      <LostDrawing />
      <p className="number soft">{status}</p>
      <h1>{title}</h1>
      {said.message && <p>{said.message}</p>}
      {!said.title && <p>{words.text}</p>}
      <p>
        <LinkButton to={action.to}>{action.label}</LinkButton>
      </p>
    </section>
  );
}

/** A route's own words, where it gave some. */
function saidBy(data: unknown): Partial<PlainError> {
  if (typeof data === "string") return { message: data };
  const { title, message, signIn } = (data ?? {}) as Partial<PlainError>;
  return typeof title === "string" && typeof message === "string" ? { title, message, signIn } : {};
}
