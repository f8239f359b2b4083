import { Link } from "react-router";
import { requireProject } from "~/auth/require.server";
import { Thread } from "~/components/notes/Thread";
import { VerdictForm } from "~/components/notes/VerdictForm";
import { MakePlate } from "~/components/plates/MakePlate";
import { Caution } from "~/components/ui/Caution";
import { DateTime } from "~/components/ui/DateTime";
import { VerdictTag } from "~/components/ui/Tag";
import { formatFrequency } from "~/measurement/units";
import { TrailOfDip } from "../trails/components/TrailOfDip.tsx";
import type { Route } from "./+types/dip";
import { Causes } from "./components/Causes.tsx";
import { CloseUp } from "./components/CloseUp.tsx";
import { DipNumbers } from "./components/DipNumbers.tsx";
import { EvidenceChoice } from "./components/EvidenceChoice.tsx";
import { Provenance } from "./components/Provenance.tsx";
import { VerdictHistory } from "./components/VerdictHistory.tsx";
import { Whereabouts } from "./components/Whereabouts.tsx";
import { type DipPageData, loadDipPage } from "./dip-page.server.ts";

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  return loadDipPage(access, args.params.dip);
}

export const meta: Route.MetaFunction = ({ data }) => [
  { title: data ? `Dip at ${frequencyOf(data)}, ${data.sweep.title} · Swale` : "Dip · Swale" },
];

export default function DipPage({ loaderData }: Route.ComponentProps) {
  const { projectId, dip, sweep, designBands, dismissed, thread } = loaderData;
  const sweepPath = `/projects/${projectId}/sweeps/${sweep.publicId}`;
  const inside = designBands.some((band) => holds(band, dip.numbers.frequencyHz));
  const outside = designBands.length > 0 && !inside;
  const { verdictOfTrail } = loaderData.judgement;
  return (
    <article className="grid gap-6">
      <header className="grid gap-2">
        <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
          <h1>
            Dip at <span className="font-mono tracking-tight">{frequencyOf(loaderData)}</span>
          </h1>
          <VerdictTag verdict={dip.verdict} />
          <MakePlate from={`dip:${dip.publicId}`} />
        </div>
        <p className="soft">
          in <Link to={`${sweepPath}?dip=${dip.publicId}`}>{sweep.title}</Link>,{" "}
          {sweep.takenAt ? (
            <>
              taken <DateTime at={sweep.takenAt} />
            </>
          ) : (
            "date not said"
          )}
        </p>
        <Neighbours data={loaderData} />
        <TrailOfDip projectId={projectId} dipId={dip.publicId} trail={loaderData.trail} />
      </header>
      {!dip.present && (
        <p className="panel border-l-3 border-l-clay">
          The sweep's current analysis does not find this dip any more: its reading or its settings were
          changed. The numbers below are the last ones it had; the thread and the verdict are kept.
        </p>
      )}
      {outside && !dismissed.includes("outside-bands") && (
        <Caution id="outside-bands">
          This dip lies outside the design bands: a finding, not a permission. Transmit only where your
          licence and local rules allow.
        </Caution>
      )}
      <div className="grid gap-8 lg:grid-cols-[minmax(0,3fr)_minmax(20rem,2fr)] lg:grid-rows-[auto_1fr]">
        <div className="grid gap-8 content-start min-w-0">
          <CloseUp data={loaderData} />
          <DipNumbers data={loaderData} />
        </div>
        <div className="grid gap-8 content-start min-w-0 lg:col-start-2 lg:row-start-1 lg:row-span-2">
          <section aria-labelledby="verdict" className="grid gap-3">
            <h2 id="verdict">Verdict</h2>
            <VerdictForm
              projectId={projectId}
              dipId={dip.publicId}
              verdict={dip.verdict}
              verdictText={dip.verdictText}
              verdictBy={dip.verdictBy}
              may={loaderData.mayVerdict}
              evidence={<EvidenceChoice evidence={loaderData.judgement.evidence} />}
            />
            {verdictOfTrail && (
              <p className="text-small">
                This is the verdict of{" "}
                <Link to={`/projects/${projectId}/trails/${verdictOfTrail.publicId}`}>
                  its trail{verdictOfTrail.label && `, ${verdictOfTrail.label}`}
                </Link>
                , which stands for every dip on it that has no later one of its own.
              </p>
            )}
            <VerdictHistory data={loaderData} />
          </section>
          <section aria-labelledby="thread" className="grid gap-4">
            <h2 id="thread">What is said about it</h2>
            <Thread
              projectId={projectId}
              place={{ dip: dip.publicId }}
              thread={thread}
              mayWrite={loaderData.mayWrite}
            />
          </section>
        </div>
        <div className="grid gap-8 content-start min-w-0">
          <Whereabouts data={loaderData} />
          <Causes data={loaderData} inside={inside} />
          <Provenance data={loaderData} />
        </div>
      </div>
    </article>
  );
}

function Neighbours({ data: { neighbours, projectId } }: { data: DipPageData }) {
  const { previous, next } = neighbours;
  if (!previous && !next) return <p className="soft text-small">The only dip found in this sweep.</p>;
  const path = (publicId: string) => `/projects/${projectId}/dips/${publicId}`;
  return (
    <nav aria-label="Dips of this sweep" className="flex flex-wrap gap-x-6 gap-y-1 text-small no-print">
      {previous && (
        <Link to={path(previous.publicId)} rel="prev">
          Lower:{" "}
          <span className="font-mono">
            {formatFrequency(previous.frequencyHz, previous.frequencyUncertaintyHz)}
          </span>
        </Link>
      )}
      {next && (
        <Link to={path(next.publicId)} rel="next">
          Higher:{" "}
          <span className="font-mono">{formatFrequency(next.frequencyHz, next.frequencyUncertaintyHz)}</span>
        </Link>
      )}
    </nav>
  );
}

function frequencyOf({ dip: { numbers } }: Pick<DipPageData, "dip">): string {
  return formatFrequency(numbers.frequencyHz, numbers.frequencyUncertaintyHz);
}

function holds(band: { lowHz: number; highHz: number }, hz: number): boolean {
  return band.lowHz <= hz && hz <= band.highHz;
}
