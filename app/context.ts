import { createContext } from "react-router";

/** What `server.ts` gives every request before a loader runs. */

/** The nonce of this response's content security policy; every inline script must carry it. */
export const nonceContext = createContext<string>();

/** Where the request came from, as far as the proxies in front may be believed. */
export const clientAddressContext = createContext("");

/** One id for a request, in the access log and on error pages. */
export const requestIdContext = createContext<string>();
