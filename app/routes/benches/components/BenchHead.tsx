import { Form } from "react-router";
import { MakePlate } from "~/components/plates/MakePlate";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { Button, LinkButton } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { Dialog } from "~/components/ui/Dialog";
import { Tag } from "~/components/ui/Tag";
import type { BenchPageData } from "../bench-page.server";

/** Name, which version is shown, and what can be done with the bench. */
export function BenchHead({ data }: { data: BenchPageData }) {
  const { project, bench, version, versions, may } = data;
  const base = `/projects/${project.publicId}/benches`;
  const page = `${base}/${bench.publicId}`;
  return (
    <header className="grid gap-2">
      <Breadcrumbs items={[{ label: "Benches", to: base }]} />
      <div className="flex flex-wrap items-start justify-between gap-x-6 gap-y-3">
        <h2 className="sweep-title">{bench.name}</h2>
        <div className="flex flex-wrap gap-2 no-print">
          <LinkButton to={`${page}/compare`} variant="quiet" size="small">
            Compare
          </LinkButton>
          {!bench.elsewhere && <MakePlate from={`bench:${bench.publicId}`} />}
          {may.edit && (
            <>
              <LinkButton to={`${page}/rebuild`} variant="quiet" size="small" icon="add">
                Rebuilt?
              </LinkButton>
              <LinkButton
                to={`${page}/edit?version=${version.publicId}`}
                variant="quiet"
                size="small"
                icon="edit"
              >
                Details
              </LinkButton>
              <PutAway data={data} />
              {data.sweepCount === 0 && <Delete name={bench.name} />}
            </>
          )}
        </div>
      </div>
      <p className="provenance">
        As it is from <DateTime at={version.validFrom} dateOnly />
        {versions.length > 1 && ` · version ${version.number} of ${versions.length}`}
        {version.remark && ` · ${version.remark}`}
      </p>
      {(bench.owner || bench.elsewhere || bench.retiredAt) && (
        <p className="flex flex-wrap gap-2">
          {bench.owner && <Tag tone="fen">{bench.owner === "you" ? "yours" : `${bench.owner}’s own`}</Tag>}
          {bench.elsewhere && <Tag>kept in another project</Tag>}
          {bench.retiredAt && <Tag tone="clay">put away</Tag>}
        </p>
      )}
      {version.publicId !== versions[0].publicId && (
        <p className="text-small text-clay">This is how the bench was; it has been rebuilt since.</p>
      )}
    </header>
  );
}

function PutAway({ data }: { data: BenchPageData }) {
  const { retiredAt } = data.bench;
  return (
    <Form method="post">
      <Button variant="quiet" size="small" name="intent" value={retiredAt ? "resume" : "retire"}>
        {retiredAt ? "Use again" : "Put away"}
      </Button>
    </Form>
  );
}

function Delete({ name }: { name: string }) {
  return (
    <Dialog label="Delete" variant="danger" size="small" title={`Delete “${name}”?`}>
      <p className="mb-4">
        Its versions, reference sweeps and photographs go for good. No sweep was taken with it. This can’t be
        undone.
      </p>
      <Form method="post">
        <Button variant="danger" name="intent" value="delete" icon="remove">
          Delete the bench
        </Button>
      </Form>
    </Dialog>
  );
}
