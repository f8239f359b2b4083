import { data, Form, useNavigation } from "react-router";
import { requireProject } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { Button } from "~/components/ui/Button";
import { refused } from "~/errors";
import { takenWords, takeReferences } from "~/services/bench-references.server";
import { createBench } from "~/services/benches.server";
import { redirectWithMessage } from "~/services/flash.server";
import { parseForm } from "~/services/parse-form";
import type { Route } from "./+types/new";
import { readBenchForm } from "./bench-form.server";
import { newBenchSchema } from "./benches.schema";
import { BenchFields } from "./components/BenchFields";
import { BridgeCaution } from "./components/BridgeCaution";
import { ReferenceFiles } from "./components/ReferenceFiles";
import { VersionFields } from "./components/VersionFields";
import { sentOr, type VersionForm } from "./version-form";
import { dayOf } from "./words";

export const meta: Route.MetaFunction = () => [{ title: "New bench · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { project } = await requireProject(args, "bench.edit");
  return { project: { publicId: project.publicId }, today: dayOf(new Date()) };
}

export async function action(args: Route.ActionArgs) {
  const { project, person } = await requireProject(args, "bench.edit");
  if (!person) throw refused("Sign in first. Nothing was stored.");
  const { fields, files, fault } = await readBenchForm(args.request);
  const submission = parseForm(fields, { schema: newBenchSchema });
  if (submission.status !== "success" || fault) {
    return data(
      { lastResult: submission.reply(), fault: fault ?? (files.length > 0 ? CHOOSE_AGAIN : null) },
      { status: 400 },
    );
  }
  const { name, description, own, ...version } = submission.value;
  const made = await createBench(project, person, { name, description, own }, version);
  const taken = await takeReferences({ ...made, project, by: person }, files);
  const said = ["The bench is written down.", takenWords(taken)];
  return redirectWithMessage(`/projects/${project.publicId}/benches/${made.bench.publicId}`, said.join(" "));
}

export default function NewBench({ loaderData, actionData }: Route.ComponentProps) {
  const { project, today } = loaderData;
  const busy = useNavigation().state === "submitting";
  const sent = actionData?.lastResult.initialValue;
  const errors = actionData?.lastResult.error ?? {};
  const fresh: VersionForm = { validFrom: today, remark: "", parts: [], standards: {}, given: {} };
  return (
    <div className="max-w-[44rem] grid gap-6">
      <div className="grid gap-2">
        <Breadcrumbs items={[{ label: "Benches", to: `/projects/${project.publicId}/benches` }]} />
        <h2>New bench</h2>
        <p className="soft">
          The set-up that sweeps are taken with. Its open and short give the 0 dB line, its load the
          directivity: from them every SWR gets its limits.
        </p>
      </div>
      <BridgeCaution />
      <Form method="post" encType="multipart/form-data" className="grid gap-6">
        <BenchFields values={(sent ?? {}) as Record<string, string>} errors={errors} />
        <ReferenceFiles fault={actionData?.fault} />
        <VersionFields
          values={sentOr(sent, fresh)}
          errors={errors}
          today={today}
          since="Sweeps from that day on can be corrected with it: the day it was put together, if nothing was changed since."
          remark={{ label: "How it is built, in a line", hint: "May stay empty." }}
        />
        <div className="grid gap-2 justify-items-start">
          {actionData && (
            <p role="alert" className="field-error">
              Nothing was stored: look at what is marked above.
            </p>
          )}
          <Button busy={busy}>{busy ? "Reading the references" : "Write the bench down"}</Button>
        </div>
      </Form>
    </div>
  );
}

const CHOOSE_AGAIN = "Nothing was stored. Choose the files again if they are no longer here.";
