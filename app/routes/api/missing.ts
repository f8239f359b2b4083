import { absent } from "./access.server.ts";

/** Whatever else is asked under /api/v1. */
export const loader = () => absent("endpoint");
export const action = () => absent("endpoint");
