import { Form, Link } from "react-router";
import { Button } from "~/components/ui/Button";
import { Dialog } from "~/components/ui/Dialog";
import { SelectField } from "~/components/ui/Field";
import type { CorrectionData } from "../../correction-page.server";
import type { SweepPageData } from "../../sweep-page.server";

interface BenchDialogProps {
  data: SweepPageData;
  choices: NonNullable<CorrectionData["choices"]>;
}

/** Says which bench the sweep was taken with, and analyses it anew at that bench's port. */
export function BenchDialog({ data, choices }: BenchDialogProps) {
  const { correction, project } = data;
  const benches = `/projects/${project.publicId}/benches`;
  const chosen = correction.bench?.publicId ?? "";
  const gone = chosen !== "" && !choices.benches.some(({ value }) => value === chosen);
  return (
    <Dialog
      label={correction.bench ? "Another bench" : "Say the bench"}
      size="small"
      title="The bench it was taken with"
    >
      {choices.benches.length === 0 && !gone ? (
        <p>
          No bench is described yet.{" "}
          <Link to={`${benches}/new`}>Describe one from its open, short and load sweeps</Link>, then come
          back.
        </p>
      ) : (
        <Form method="post" className="grid gap-4">
          <input type="hidden" name="intent" value="bench" />
          <SelectField
            label="Bench"
            name="bench"
            defaultValue={chosen}
            hint="It counts as it was on the day of the sweep. The dips are found anew at its port; what was found before is kept."
            options={[
              { value: "", label: "None: as measured" },
              ...choices.benches,
              ...(gone
                ? [{ value: chosen, label: `${correction.bench?.name ?? "The present one"} (put away)` }]
                : []),
            ]}
          />
          <p className="text-small">
            <Link to={benches}>Benches of this project</Link>
          </p>
          <div>
            <Button>Analyse with it</Button>
          </div>
        </Form>
      )}
    </Dialog>
  );
}
