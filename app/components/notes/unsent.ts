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
    const message = isRouteErrorResponse(error) ? messageOf(error.data) : UNREACHED;
    return { lastResult: { status: "error", error: { "": [message] } } };
  }
}

function messageOf(data: unknown): string {
  const message = (data as { message?: unknown } | null)?.message;
  return typeof message === "string" ? message : REFUSED;
}

const UNREACHED =
  "The server could not be reached, so it was not sent. What you wrote is still here; try again when there is a connection.";
const REFUSED = "The server did not take it. What you wrote is still here; try again in a minute.";
