import { type ReactNode, useState } from "react";
import { data, Form, useNavigation } from "react-router";
import { requireProject } from "~/auth/require.server";
import { Button } from "~/components/ui/Button";
import { SelectField } from "~/components/ui/Field";
import { useHydrated } from "~/components/ui/hydrated";
import * as benches from "~/db/benches.server";
import * as people from "~/db/people.server";
import { usableBenches } from "~/services/bench-sweeps.server";
import type { Route } from "./+types/new";
import { benchOptions } from "./bench-options";
import { FirstSweepCaution } from "./components/cautions";
import { DropZone } from "./components/DropZone";
import { UploadResults } from "./components/UploadResults";
import { readUploadForm, takeUploads } from "./take-uploads.server";

export const meta: Route.MetaFunction = () => [{ title: "Add sweeps · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { project, person } = await requireProject(args, "sweep.add");
  const [dismissed, usable, last] = await Promise.all([
    person ? people.findDismissals(person.id) : [],
    usableBenches(project.id),
    benches.findLastUsed(project.id),
  ]);
  return {
    project: { publicId: project.publicId },
    dismissed,
    benches: benchOptions(usable, project.publicId),
    lastBench: last?.publicId ?? "",
  };
}

/** The plain form: every file at once, answered with the list of what became of each. */
export async function action(args: Route.ActionArgs) {
  const access = await requireProject(args, "sweep.add");
  const results = await takeUploads(access, await readUploadForm(args.request));
  if (results.length === 0) {
    return data(
      { results, error: "No file was chosen. Nothing was stored; choose one or more and send again." },
      400,
    );
  }
  return data({ results, error: null });
}

export default function NewSweeps({ loaderData, actionData }: Route.ComponentProps) {
  const { project, dismissed, benches, lastBench } = loaderData;
  const hydrated = useHydrated();
  const [bench, setBench] = useState(lastBench);
  const choice = (
    <SelectField
      label="Taken with the bench"
      name="bench"
      hint="Their dips are then found at its port. It can be said or changed later, too."
      defaultValue={lastBench}
      onChange={(event) => setBench(event.target.value)}
      options={[{ value: "", label: "Not said: as measured" }, ...benches]}
    />
  );
  return (
    <section className="grid gap-6" aria-labelledby="add-sweeps">
      <div>
        <h2 id="add-sweeps">Add sweeps</h2>
        <p className="soft max-w-[72ch]">
          Text with any separator, Touchstone, or a picture of a screen (PNG, JPEG, WebP). Headings, units and
          axes are found in the file; what it does not say is shown and can be changed. Up to 64 MB and
          1,000,000 points a file, 40 megapixels a picture. Place and camera data of a picture stay with the
          owners and experimenters of the project.
        </p>
      </div>
      <FirstSweepCaution dismissed={dismissed} />
      {hydrated ? (
        <>
          {benches.length > 0 && <div className="max-w-[28rem]">{choice}</div>}
          <DropZone
            action={`/projects/${project.publicId}/sweeps/upload`}
            fields={bench ? { bench } : NO_FIELDS}
          />
        </>
      ) : (
        <PlainForm>{benches.length > 0 && choice}</PlainForm>
      )}
      {actionData?.error && (
        <p role="alert" className="text-alarm">
          {actionData.error}
        </p>
      )}
      {actionData && actionData.results.length > 0 && <UploadResults results={actionData.results} />}
    </section>
  );
}

function PlainForm({ children }: { children: ReactNode }) {
  const navigation = useNavigation();
  return (
    <Form method="post" encType="multipart/form-data" className="panel grid gap-4 justify-items-start">
      <label className="grid gap-1">
        <span className="font-semibold">Sweep files</span>
        <input type="file" name="files" multiple />
      </label>
      {children}
      <Button icon="upload" busy={navigation.state !== "idle"}>
        Send
      </Button>
    </Form>
  );
}

const NO_FIELDS = {};
