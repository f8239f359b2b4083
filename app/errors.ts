import { data } from "react-router";

/** What an error page shows: what happened, what is safe, what to do. */
export interface PlainError {
  title: string;
  message: string;
  /** Offer signing in: what is asked for may be private. */
  signIn?: boolean;
}

export function notFound(what = "page", signIn = false) {
  return data<PlainError>(
    {
      title: `No such ${what}`,
      message: `There is no ${what} at this address, or it is private. Nothing was changed.`,
      signIn,
    },
    { status: 404 },
  );
}

/** Something that this service needs does not answer just now. */
export function unavailable(title: string, message: string) {
  return data<PlainError>({ title, message }, { status: 503 });
}

export function refused(message: string) {
  return data<PlainError>({ title: "Not allowed", message }, { status: 403 });
}
