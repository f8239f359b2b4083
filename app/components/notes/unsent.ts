import type { SubmissionResult } from "@conform-to/react";
import { isRouteErrorResponse } from "react-router";

/**
 * Sends a form to the server; what goes wrong on the way, or is refused there, comes back as the form's own error,
 * so that the page and the text in it stay.
 */
export async function sendOrSayWhy<T>(
  send: () => Promise<T>,
): Promise<T | { lastResult: SubmissionResult<string[]> }> {
  try {
    return await send();
  } catch (error) {
    if (error instanceof Response) throw error;
    const message = isRouteErrorResponse(error) ? messageOf(error.data, error.status) : UNREACHED;
    return { lastResult: { status: "error", error: { "": [message] } } };
  }
}

function messageOf(data: unknown, status: number): string {
  const { message, signIn } = (data ?? {}) as { message?: unknown; signIn?: unknown };
  // Who is signed out is told of a private place as if it were not there; here it was there a moment ago.
  if (status === 404 && signIn) return SIGNED_OUT;
  return typeof message === "string" ? message : REFUSED;
}

const UNREACHED =
  "The server could not be reached, so it was not sent. What you wrote is still here; try again when there is a connection.";
const SIGNED_OUT =
  "You are signed out, so it was not stored. What you wrote is kept on this device: sign in again in another tab and store it then.";
const REFUSED = "The server did not take it. What you wrote is still here; try again in a minute.";
