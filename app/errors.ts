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

/** A form that can't be taken apart: cut short on its way, or no form at all. */
export function brokenForm() {
  return data<PlainError>(
    { title: "The form did not arrive whole", message: "Nothing was stored; go back and send it again." },
    { status: 400 },
  );
}

export function refused(message: string, signIn = false) {
  return data<PlainError>({ title: "Not allowed", message, signIn }, { status: 403 });
}
