import { z } from "zod";
import type { KindName } from "~/db/bundle-kinds.server";
import { PEOPLE, RECORDS } from "./records.ts";

/** Which bundles this version makes and takes. */
export const BUNDLE_FORMAT = 1;

/** The shape of a kind's records as JSON Schema. */
export function schemaText(kind: KindName | "people"): string {
  const shape = kind === "people" ? PEOPLE : RECORDS[kind];
  const schema = z.toJSONSchema(shape, { io: "input", unrepresentable: "any" });
  return `${JSON.stringify({ title: `A record of ${kind}.json`, ...schema }, null, 1)}\n`;
}

export const README = `# A bundle

Everything of one project, in open formats, readable without the service that made it. Open \`index.html\`.

The folder above this one is a BagIt bag (RFC 8493). \`sha256sum -c manifest-sha256.txt\` there checks every file.

| folder | what |
|---|---|
| \`originals/\` | every file as it was given, byte for byte |
| \`points/\` | the points of every reading as CSV, with all digits; as Touchstone where there is phase. \`…-shown.csv\` is the curve that the dips were found in, corrected as the analysis says, thinned for drawing |
| \`records/\` | a JSON file a kind (below), each with its JSON Schema |
| \`notes/\` | threads as Markdown and as pages; all notes as W3C Web Annotations |
| \`figures/\` | each sweep drawn, SVG |
| \`photographs/\`, \`attachments/\` | originals, and under \`copies/\` what pages show |
| \`plates/\` | every form of every plate as it was frozen, its record, and the originals it rests on |
| \`write-ups/\` | as Markdown |

## Records

\`{"kind": …, "format": 1, "records": [ … ]}\`, a record on each line. \`id\` is what others name it by. Times are UTC, frequencies hertz, lengths metre unless a
field says otherwise. Null is "unknown" or "not said", never zero. A field that ends in \`Path\` (or \`path\`) says where bytes of the record are.

In points, an empty cell is a gap. \`gamma_magnitude\` is the magnitude of the reflection coefficient; \`return_loss_db\` and \`swr\` follow from it
and have no number where it is 0 or reaches 1. \`picture_…\` are what the pixels of a picture allow.

People are named as the project showed them. No addresses, ways to sign in or tokens are in a bundle. A bench that somebody lent from another
project is named by the analyses that used it and is not in here.

A plate keeps the address it was made at: that, not its place here, is where it is cited. \`mentions.json\` has the pages elsewhere that cite plates
and write-ups, with what an owner decided; where a bundle is taken in they are kept as they are, and nobody is asked or told again.
`;
