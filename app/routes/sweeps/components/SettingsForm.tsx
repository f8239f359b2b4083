import { useRef } from "react";
import { Form, Link, useNavigation, useSubmit } from "react-router";
import { Button } from "~/components/ui/Button";
import { InputField } from "~/components/ui/Field";
import type { AnalysisSettings, Plane } from "~/measurement/sweep";
import { PLANE_WORDS } from "../correction-words";
import { type SweepView, searchWith } from "../sweeps.schema";

interface SettingsFormProps {
  view: SweepView;
  /** Kept with the sweep. */
  stored: AnalysisSettings;
  /** Where the stored dips were found. */
  storedPlane: Plane;
  mayKeep: boolean;
}

/** What counts as a dip and what as its bandwidth. The effect is shown at once, in the address; keeping is asked for. */
export function SettingsForm({ view, stored, storedPlane, mayKeep }: SettingsFormProps) {
  const submit = useSubmit();
  const navigation = useNavigation();
  const form = useRef<HTMLFormElement>(null);
  const swrLimit = view.swrLimit ?? stored.swrLimit;
  const minimumProminenceDb = view.minimumProminenceDb ?? stored.minimumProminenceDb;
  const plane = view.plane ?? storedPlane;
  const moved = plane !== storedPlane;
  const tried = moved || swrLimit !== stored.swrLimit || minimumProminenceDb !== stored.minimumProminenceDb;
  const onChange = () => {
    if (form.current?.checkValidity()) submit(form.current, { replace: true, preventScrollReset: true });
  };
  return (
    <div className="flex flex-wrap items-end gap-x-4 gap-y-3">
      <Form
        ref={form}
        className="flex flex-wrap items-end gap-x-4 gap-y-3"
        preventScrollReset
        onChange={onChange}
      >
        <Kept view={view} />
        <InputField
          label="SWR limit"
          name="limit"
          type="number"
          step="any"
          min={1.01}
          max={20}
          inputMode="decimal"
          key={`limit-${swrLimit}`}
          defaultValue={swrLimit}
          className="w-28"
        />
        <InputField
          label="Least prominence"
          name="prominence"
          type="number"
          step="any"
          min={0.1}
          max={40}
          inputMode="decimal"
          unit="dB"
          key={`prominence-${minimumProminenceDb}`}
          defaultValue={minimumProminenceDb}
          className="w-36"
        />
        <noscript>
          <Button variant="quiet">Try</Button>
        </noscript>
      </Form>
      {tried && (
        <div className="flex flex-wrap items-center gap-3">
          {mayKeep && (
            <Form method="post" preventScrollReset>
              <input type="hidden" name="intent" value="settings" />
              <input type="hidden" name="swrLimit" value={swrLimit} />
              <input type="hidden" name="minimumProminenceDb" value={minimumProminenceDb} />
              <input type="hidden" name="plane" value={plane} />
              <Button busy={navigation.formMethod === "POST"}>
                {moved ? `Keep “${PLANE_WORDS[plane]}” and these settings` : "Keep these settings"}
              </Button>
            </Form>
          )}
          <Link
            to={searchWith(view, { swrLimit: null, minimumProminenceDb: null, plane: null }) || "?"}
            preventScrollReset
          >
            Back to {moved && `“${PLANE_WORDS[storedPlane]}”, `}
            {stored.swrLimit}:1 and {stored.minimumProminenceDb} dB
          </Link>
          {!mayKeep && (
            <span className="text-small soft">Only in this address; not kept with the sweep.</span>
          )}
        </div>
      )}
    </div>
  );
}

/** The rest of the view, so that a plain form does not lose it. */
function Kept({ view }: { view: SweepView }) {
  const search = new URLSearchParams(searchWith(view, { swrLimit: null, minimumProminenceDb: null }));
  return [...search].map(([name, value]) => <input key={name} type="hidden" name={name} value={value} />);
}
