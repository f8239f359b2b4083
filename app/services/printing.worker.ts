/** What the printing thread runs; see `printing.server.ts`. A thread of these begins with what it exports as default. */
export { makeForms as default } from "./plates/make-forms.server.ts";
export { printDocument } from "./write-ups/document.server.ts";
