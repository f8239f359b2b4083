/** What a worked example is made of. */

export interface Example {
  /** As the OpenAPI document calls what is asked. */
  operation: string;
  says: string;
  /** Under /api/v1; `{name}` is taken from an earlier answer, `{origin}` is the address of this server. */
  path: string;
  /** For everybody: outside of /api/v1, and sent without a token. */
  open?: true;
  /** The media type that is asked for. */
  accept?: string;
  json?: unknown;
  file?: { name: string; text: string; fields: Record<string, string> };
  /** Several of them; one without a text is what an earlier answer was saved as. */
  files?: { field: string; name: string; text?: string }[];
  /** What goes beside them. */
  fields?: Record<string, string>;
  /** Sent as a plain form. */
  form?: Record<string, string>;
  /** The answer is bytes, kept in a file of this name. */
  saves?: string;
  /** Work goes on behind the answer: its `links.self` is asked for until `where` is `is`, and that is what is shown. */
  until?: { where: string; is: string };
  /** What later examples take from the answer: name → where it is. */
  keep?: Record<string, string>;
}

export interface ExampleGroup {
  title: string;
  examples: Example[];
}
