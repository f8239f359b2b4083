import type { SubmissionResult } from "@conform-to/react";
import { data, isRouteErrorResponse } from "react-router";

/**
 * Sends a form to the server; what goes wrong on the way, or is refused there, comes back as the form's own error,
 * so that the page and the text in it stay.
 */
export async function sendOrSayWhy<T>(send: () => Promise<T>): Promise<T | ReturnType<typeof data<Unsent>>> {
  try {
    return await send();
  } catch (error) {
    if (error instanceof Response) throw error;
    const answered = isRouteErrorResponse(error);
    const signedOut = answered && isSignedOut(error.data);
    const message = answered ? messageOf(error.data, signedOut) : UNREACHED;
    const unsent = {
      lastResult: { status: "error", error: { "": [message] } },
      unreached: !answered,
      signedOut,
    };
    // With a status that says so, the page is not read anew: it would be gone, as the server or the session is.
    return data(unsent as Unsent, { status: answered ? error.status : UNREACHED_STATUS });
  }
}

export interface Unsent {
  lastResult: SubmissionResult<string[]>;
  /** No answer came: it may be sent again as it is. */
  unreached: boolean;
  /** Whoever sent it is signed out. */
  signedOut: boolean;
}

/** Who is signed out is told of a private place as if it were not there; here it was there a moment ago. */
function isSignedOut(answer: unknown): boolean {
  return (answer as { signIn?: unknown } | null)?.signIn === true;
}

function messageOf(answer: unknown, signedOut: boolean): string {
  const { message } = (answer ?? {}) as { message?: unknown };
  if (signedOut) return SIGNED_OUT;
  return typeof message === "string" ? message : REFUSED;
}

const UNREACHED_STATUS = 503;
const UNREACHED =
  "The server could not be reached, so it was not sent. What you wrote is still here; try again when there is a connection.";
const SIGNED_OUT =
  "You are signed out, so it was not stored. What you wrote is kept on this device: sign in again, and store it then.";
const REFUSED = "The server did not take it. What you wrote is still here; try again in a minute.";
