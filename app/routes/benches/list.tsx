import { Link } from "react-router";
import { requireProject } from "~/auth/require.server";
import { LinkButton } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { EmptyState } from "~/components/ui/EmptyState";
import { Tag } from "~/components/ui/Tag";
import * as benchReferences from "~/db/bench-references.server";
import * as benches from "~/db/benches.server";
import type { Route } from "./+types/list";
import { listOf } from "./words";

export const meta: Route.MetaFunction = () => [{ title: "Benches · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { project, person, may } = await requireProject(args, "project.read");
  const [own, borrowed] = await Promise.all([
    benches.findAllByProject(project.id),
    may("sweep.add") ? benches.findBorrowable(project.id) : [],
  ]);
  const shown = (row: benches.ListedBench) => shownBench(row, person?.id ?? null);
  return {
    project: { publicId: project.publicId },
    mayAdd: may("bench.edit"),
    own: own.map(shown),
    borrowed: borrowed.map(shown),
  };
}

export default function Benches({ loaderData }: Route.ComponentProps) {
  const { project, mayAdd, own, borrowed } = loaderData;
  const base = `/projects/${project.publicId}/benches`;
  return (
    <section className="grid gap-6" aria-labelledby="benches">
      <div className="flex flex-wrap items-end justify-between gap-4">
        <h2 id="benches" className="sweep-title">
          Benches
        </h2>
        {mayAdd && own.length > 0 && (
          <LinkButton to={`${base}/new`} icon="add">
            New bench
          </LinkButton>
        )}
      </div>
      {own.length === 0 ? (
        <EmptyState
          drawing="benches"
          title="No bench yet"
          action={mayAdd && <LinkButton to={`${base}/new`}>Write the first bench down</LinkButton>}
        >
          Sweep the bench with an open, a short and a load, and every SWR gets its limits.
        </EmptyState>
      ) : (
        <BenchCards base={base} benches={own} />
      )}
      {borrowed.length > 0 && (
        <section className="grid gap-4" aria-labelledby="borrowed">
          <h2 id="borrowed">Members’ own benches that can be used here</h2>
          <BenchCards base={base} benches={borrowed} />
        </section>
      )}
    </section>
  );
}

type Shown = ReturnType<typeof shownBench>;

function BenchCards({ base, benches: rows }: { base: string; benches: Shown[] }) {
  return (
    <ul className="bench-cards">
      {rows.map((bench) => (
        <li key={bench.publicId} className="panel grid gap-1 content-start">
          <p className="flex flex-wrap items-baseline justify-between gap-2">
            <Link to={`${base}/${bench.publicId}`} className="font-semibold break-words min-w-0">
              {bench.name}
            </Link>
            {bench.retired && <Tag>put away</Tag>}
            {bench.owner && <Tag tone="fen">{bench.owner}</Tag>}
          </p>
          <p className="text-small">
            {bench.kinds.length > 0
              ? `Swept with ${listOf(bench.kinds.map(withArticle))}`
              : "No reference sweep yet"}
            {bench.lacking.length > 0 && <span className="text-clay">; no {listOf(bench.lacking)}</span>}
          </p>
          <p className="text-small soft">
            {bench.validFrom && (
              <>
                As it is from <DateTime at={bench.validFrom} dateOnly />
              </>
            )}
            {bench.versionCount > 1 && ` · version ${bench.versionCount}`}
            {` · ${bench.sweepCount === 1 ? "1 sweep" : `${bench.sweepCount || "no"} sweeps`} taken with it`}
          </p>
        </li>
      ))}
    </ul>
  );
}

function shownBench(
  { bench, owner, versionCount, validFrom, kinds, sweepCount }: benches.ListedBench,
  self: number | null,
) {
  const known = (kinds ?? "").split(",");
  return {
    publicId: bench.publicId,
    name: bench.name,
    owner: bench.ownerId === null ? null : bench.ownerId === self ? "yours" : owner,
    retired: bench.retiredAt !== null,
    versionCount,
    validFrom: validFrom ? new Date(`${String(validFrom).replace(" ", "T")}Z`) : null,
    kinds: benchReferences.REFERENCE_KINDS.filter((kind) => known.includes(kind)),
    lacking: (["open", "short", "load"] as const).filter((kind) => !known.includes(kind)),
    sweepCount,
  };
}

function withArticle(kind: string): string {
  return kind === "open" ? "an open" : `a ${kind}`;
}
