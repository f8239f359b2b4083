/** What a worker thread runs; see `reading.server.ts`. */
export { flatPicture } from "./picture-copies.server.ts";
export { default } from "./read-and-analyse.server.ts";
