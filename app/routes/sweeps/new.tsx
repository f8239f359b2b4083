import { data, Form, useNavigation } from "react-router";
import { requireProject } from "~/auth/require.server";
import { Button } from "~/components/ui/Button";
import { useHydrated } from "~/components/ui/hydrated";
import * as people from "~/db/people.server";
import type { Route } from "./+types/new";
import { FirstSweepCaution } from "./components/cautions";
import { DropZone } from "./components/DropZone";
import { UploadResults } from "./components/UploadResults";
import { readUploadForm, takeUploads } from "./take-uploads.server";

export const meta: Route.MetaFunction = () => [{ title: "Add sweeps · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { project, person } = await requireProject(args, "sweep.add");
  const dismissed = person ? await people.findDismissals(person.id) : [];
  return { project: { publicId: project.publicId }, dismissed };
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
  const { project, dismissed } = loaderData;
  const hydrated = useHydrated();
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
      {hydrated ? <DropZone action={`/projects/${project.publicId}/sweeps/upload`} /> : <PlainForm />}
      {actionData?.error && (
        <p role="alert" className="text-alarm">
          {actionData.error}
        </p>
      )}
      {actionData && actionData.results.length > 0 && <UploadResults results={actionData.results} />}
    </section>
  );
}

function PlainForm() {
  const navigation = useNavigation();
  return (
    <Form method="post" encType="multipart/form-data" className="panel grid gap-4 justify-items-start">
      <label className="grid gap-1">
        <span className="font-semibold">Sweep files</span>
        <input type="file" name="files" multiple />
      </label>
      <Button icon="upload" busy={navigation.state !== "idle"}>
        Send
      </Button>
    </Form>
  );
}
