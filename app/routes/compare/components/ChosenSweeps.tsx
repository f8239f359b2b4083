import { Link } from "react-router";
import { TraceSample } from "~/charts/OverlayChart";
import { DateTime } from "~/components/ui/DateTime";
import { Icon, type IconName } from "~/components/ui/Icon";
import { Tag } from "~/components/ui/Tag";
import { formatFrequency } from "~/measurement/units";
import { compareSearch } from "../compare.schema";
import type { ComparePageData, ShownSweep } from "../compare-page.server";

/** The sweeps with their lines' looks: their order, which one the others are held against, and leaving them out. */
export function ChosenSweeps({ data }: { data: ComparePageData }) {
  const { sweeps, reference, shown, view } = data;
  return (
    <section aria-labelledby="chosen" className="grid gap-2">
      <h3 id="chosen" className="sr-only">
        The sweeps
      </h3>
      <ol className="compare-list">
        {sweeps.map((sweep, i) => (
          <li key={sweep.publicId}>
            <span className="compare-look">
              <span className="number font-semibold">{sweep.letter}</span>
              <TraceSample style={i} />
            </span>
            <Facts sweep={sweep} isReference={sweep.publicId === reference && sweeps.length > 1} />
            <Moves data={data} at={i} />
          </li>
        ))}
      </ol>
      {sweeps.length > 2 && (
        <p className="text-small no-print">
          <Link to={compareSearch(view, { sweeps: byDate(sweeps) })} replace preventScrollReset>
            In order of their dates
          </Link>
        </p>
      )}
      {shown?.remarks.map((sentence) => (
        <p key={sentence} className="text-small text-clay max-w-[80ch]">
          {sentence}
        </p>
      ))}
    </section>
  );
}

function Facts({ sweep, isReference }: { sweep: ShownSweep; isReference: boolean }) {
  const { title, project, publicId, takenAt, startHz, stopHz, pointCount, plane, bench } = sweep;
  return (
    <div className="grid gap-0.5 min-w-0">
      <p className="flex flex-wrap items-baseline gap-x-3">
        <Link to={`/projects/${project.publicId}/sweeps/${publicId}`} className="font-semibold break-words">
          {title}
        </Link>
        {!project.here && <span className="text-small soft">of “{project.title}”</span>}
        {isReference && <Tag tone="fen">the others are held against this</Tag>}
      </p>
      <p className="text-tiny soft">
        {takenAt ? <DateTime at={takenAt} dateOnly /> : "date not said"}
        {` · ${formatFrequency(startHz)} – ${formatFrequency(stopHz)} · ${pointCount.toLocaleString("en")} points · ${plane}`}
        {bench && ` · bench “${bench}”`}
      </p>
    </div>
  );
}

function Moves({ data: { sweeps, reference, view }, at }: { data: ComparePageData; at: number }) {
  const ids = sweeps.map(({ publicId }) => publicId);
  const { publicId, letter } = sweeps[at];
  const swapped = (other: number) => ids.with(at, ids[other]).with(other, publicId);
  // The reference stays the same sweep wherever it moves to.
  const keep = { reference };
  return (
    <div className="compare-moves no-print">
      {publicId !== reference && (
        <Step
          to={compareSearch(view, { sweeps: ids, reference: publicId })}
          label={`Hold the others against ${letter}`}
          words="hold against"
        />
      )}
      {at > 0 && (
        <Step
          to={compareSearch(view, { ...keep, sweeps: swapped(at - 1) })}
          label={`${letter} one up`}
          icon="down"
          turned
        />
      )}
      {at < ids.length - 1 && (
        <Step
          to={compareSearch(view, { ...keep, sweeps: swapped(at + 1) })}
          label={`${letter} one down`}
          icon="down"
        />
      )}
      <Step
        to={compareSearch(view, {
          sweeps: ids.filter((id) => id !== publicId),
          reference: publicId === reference ? null : reference,
        })}
        label={`Leave ${letter} out`}
        icon="close"
      />
    </div>
  );
}

interface StepProps {
  to: string;
  label: string;
  icon?: IconName;
  turned?: boolean;
  words?: string;
}

function Step({ to, label, icon, turned = false, words }: StepProps) {
  return (
    <Link to={to} replace preventScrollReset aria-label={label} title={label} className="compare-move">
      {words}
      {icon && (
        <span className={turned ? "inline-flex rotate-180" : "inline-flex"}>
          <Icon name={icon} size={16} />
        </span>
      )}
    </Link>
  );
}

function byDate(sweeps: readonly ShownSweep[]): string[] {
  const timeOf = ({ takenAt, createdAt }: ShownSweep) => new Date(takenAt ?? createdAt).getTime();
  return [...sweeps].sort((a, b) => timeOf(a) - timeOf(b)).map(({ publicId }) => publicId);
}
