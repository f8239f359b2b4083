import { Form, Link } from "react-router";
import { Unfold } from "~/components/notes/Unfold";
import { Button } from "~/components/ui/Button";
import type { TrailOfDipData } from "../trail-of-dip.server";

interface TrailOfDipProps {
  /** Public ids. */
  projectId: string;
  dipId: string;
  trail: TrailOfDipData;
}

/** Which trail the dip is on; by hand it goes to another one. */
export function TrailOfDip({ projectId, dipId, trail }: TrailOfDipProps) {
  const { own, others, mayCorrect } = trail;
  const base = `/projects/${projectId}/trails`;
  if (!own) return null;
  const form = <OtherTrail action={`${base}/${own.publicId}`} dipId={dipId} others={others} />;
  return (
    <div className="flex flex-wrap items-baseline gap-x-4 gap-y-1 text-small">
      <p>
        On the trail <Link to={`${base}/${own.publicId}`}>{own.label}</Link>
      </p>
      {mayCorrect && others.length > 0 && (
        <Unfold label="It belongs to another trail" about="" bare={form}>
          {() => form}
        </Unfold>
      )}
    </div>
  );
}

function OtherTrail({
  action,
  dipId,
  others,
}: {
  action: string;
  dipId: string;
  others: TrailOfDipData["others"];
}) {
  return (
    <Form method="post" action={action} className="flex flex-wrap items-end gap-3 no-print">
      <input type="hidden" name="intent" value="join-dip" />
      <input type="hidden" name="dip" value={dipId} />
      <label className="grid gap-1">
        <span className="soft">The trail that it belongs to</span>
        <select name="trail" className="control" required>
          {others.map(({ publicId, label }) => (
            <option key={publicId} value={publicId}>
              {label}
            </option>
          ))}
        </select>
      </label>
      <Button variant="quiet" size="small">
        Put it there
      </Button>
    </Form>
  );
}
