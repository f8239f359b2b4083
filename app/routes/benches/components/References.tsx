import { Form, Link, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { Tag } from "~/components/ui/Tag";
import type { BenchPageData } from "../bench-page.server";
import { REFERENCE_WORDS, spanWords } from "../words";
import { type Kind, ReferenceFiles } from "./ReferenceFiles";

/** The reference sweeps of the version that is shown, with a way to add what is missing. */
export function References({ data, fault }: { data: BenchPageData; fault: string | null }) {
  const { references, may, version } = data;
  const busy = useNavigation().formData?.get("intent") === "references";
  const absent = (Object.keys(REFERENCE_WORDS) as Kind[]).filter(
    (kind) => !references.some((reference) => reference.kind === kind),
  );
  return (
    <section aria-labelledby="references" className="grid gap-3" id="reference-sweeps">
      <h2 id="references">Reference sweeps</h2>
      {references.length === 0 && <p className="soft">None yet.</p>}
      <ul className="grid gap-2">
        {references.map((reference) => (
          <Reference key={reference.kind} reference={reference} />
        ))}
      </ul>
      {may.edit && absent.length > 0 && (
        <details className="no-print" open={fault !== null || references.length === 0}>
          <summary className="button button-quiet button-small">
            Add {absent.length === 4 ? "them" : absent.join(", ")}
          </summary>
          <Form method="post" encType="multipart/form-data" className="panel grid gap-4 mt-3 add-references">
            <input type="hidden" name="version" value={version.publicId} />
            <ReferenceFiles kinds={absent} fault={fault} />
            <div>
              <Button name="intent" value="references" icon="upload" busy={busy}>
                Take them in
              </Button>
            </div>
          </Form>
        </details>
      )}
    </section>
  );
}

function Reference({ reference }: { reference: BenchPageData["references"][number] }) {
  const { kind, href, fileName, unread, startHz, stopHz, pointCount } = reference;
  return (
    <li className="panel grid gap-0.5">
      <p className="flex flex-wrap items-baseline justify-between gap-2">
        {href ? (
          <Link to={href} className="font-semibold">
            {REFERENCE_WORDS[kind]}
          </Link>
        ) : (
          <span className="font-semibold">{REFERENCE_WORDS[kind]}</span>
        )}
        {unread && <Tag tone="clay">to be read</Tag>}
      </p>
      {fileName && <p className="text-small soft break-all">{fileName}</p>}
      {startHz !== null && stopHz !== null && (
        <p className="text-small">
          {spanWords({ fromHz: startHz, toHz: stopHz })}
          {pointCount !== null && `, ${pointCount.toLocaleString("en")} points`}
        </p>
      )}
    </li>
  );
}
