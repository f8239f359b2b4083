import { Link } from "react-router";
import { EXAMPLE_GROUPS } from "../examples.ts";
import { BATCH_TABLE } from "../examples-bundles.ts";
import { Code } from "./Code.tsx";

/** What holds for every call. */
export function Rules({ base }: { base: string }) {
  return (
    <section id="rules" aria-labelledby="rules-title" className="grid gap-4 min-w-0">
      <h1 id="rules-title">For scripts</h1>
      <div className="grid gap-3 max-w-[72ch]">
        <p>
          The calls below are under <code className="break-all">{base}</code>; those for everybody are outside
          of it and need no token. All of them are described for programs in the{" "}
          <a href={`${base}/openapi.json`}>OpenAPI document</a>. Every example is run against the server
          whenever Swale is built; people, places and numbers in them are invented, long lists are cut and
          numbers rounded to eight digits.
        </p>
        <p>
          <strong>A token</strong> stands for you: make one under{" "}
          <Link to="/settings/tokens">Tokens for scripts</Link>, to read only or to read and write. It is
          shown once; revoke it there when it is no longer needed. It may do what your role in a project may
          do.
        </p>
      </div>
      <Code label="Keep the token out of the commands" text={"read -rs SWALE_TOKEN && export SWALE_TOKEN"} />
      <ul className="api-rules">
        <li>Ids are short and public, times are UTC, units are in the names: Hz, dB, metres.</li>
        <li>
          What is unknown is <code>null</code>, never zero.
        </li>
        <li>
          A list with a <code>nextCursor</code> comes in pages of at most 100 rows: give it back as{" "}
          <code>cursor</code> for the next one.
        </li>
        <li>
          600 calls that read and 120 that write a minute and token; beyond that <code>429</code>, with the
          seconds to wait in <code>Retry-After</code>.
        </li>
        <li>A file has at most 64 MB and 1,000,000 points, a picture 40 megapixels.</li>
        <li>
          What takes longer is answered with <code>202</code> and goes on behind the answer: ask the address
          in <code>Location</code> every few seconds until it is done.
        </li>
        <li>
          Where a call takes a <code>clientKey</code>, one that is sent again after a lost answer does its
          work once.
        </li>
      </ul>
      <p className="max-w-[72ch]">
        What goes wrong is said as <code>application/problem+json</code> (RFC 9457): what happened, what is
        safe, what to do. Without a token:
      </p>
      <Code label="The answer without a token" text={NO_TOKEN} />
      <details className="min-w-0">
        <summary>The file that the examples send</summary>
        <Code label="reeds.s1p" text={sample()} />
      </details>
      <details className="min-w-0">
        <summary>The table of the batch</summary>
        <Code label="reeds.csv" text={BATCH_TABLE} />
      </details>
    </section>
  );
}

/** As tests/web/api-examples.test.ts holds it against the server. */
export const NO_TOKEN = `{
  "type": "about:blank",
  "title": "Unauthorized",
  "status": 401,
  "detail": "Send a token: \\"Authorization: Bearer …\\". Tokens are made at /settings/tokens.",
  "code": "no-token"
}`;

function sample(): string {
  const files = EXAMPLE_GROUPS.flatMap(({ examples }) => examples).flatMap(({ file }) => file ?? []);
  return files[0]?.text ?? "";
}
