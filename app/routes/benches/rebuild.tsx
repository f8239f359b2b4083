import { data, Form, useNavigation } from "react-router";
import { requireProject } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { Button } from "~/components/ui/Button";
import * as benches from "~/db/benches.server";
import { refused } from "~/errors";
import { takenWords, takeReferences } from "~/services/bench-references.server";
import { rebuildBench } from "~/services/benches.server";
import { redirectWithMessage } from "~/services/flash.server";
import { parseForm } from "~/services/parse-form";
import type { Route } from "./+types/rebuild";
import { readBenchForm } from "./bench-form.server";
import { rebuildSchema } from "./benches.schema";
import { BridgeCaution } from "./components/BridgeCaution";
import { ReferenceFiles } from "./components/ReferenceFiles";
import { VersionFields } from "./components/VersionFields";
import { pickVersion, requireOwnBench } from "./require-bench.server";
import { sentOr, versionForm } from "./version-form";
import { dayOf } from "./words";

export const meta: Route.MetaFunction = () => [{ title: "Rebuilt bench · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "bench.edit");
  const { bench } = await requireOwnBench(access, args.params.bench);
  const { version } = pickVersion(await benches.findVersions(bench.id), null);
  const today = dayOf(new Date());
  return {
    project: { publicId: access.project.publicId },
    bench: { publicId: bench.publicId, name: bench.name },
    number: version.number,
    values: { ...versionForm(version), validFrom: today, remark: "" },
    today,
  };
}

export async function action(args: Route.ActionArgs) {
  const access = await requireProject(args, "bench.edit");
  const { project, person } = access;
  if (!person) throw refused("Sign in first. Nothing was stored.");
  const { bench } = await requireOwnBench(access, args.params.bench);
  const { fields, files, fault } = await readBenchForm(args.request);
  const submission = parseForm(fields, { schema: rebuildSchema });
  if (submission.status !== "success" || fault) {
    return data({ lastResult: submission.reply(), fault }, { status: 400 });
  }
  const version = await rebuildBench(bench, person, submission.value);
  const taken = await takeReferences({ bench, version, project, by: person }, files);
  const said = [
    `Version ${version.number} is written down; sweeps keep the numbers they have until somebody asks for new ones.`,
    takenWords(taken),
  ];
  return redirectWithMessage(`/projects/${project.publicId}/benches/${bench.publicId}`, said.join(" "));
}

export default function Rebuild({ loaderData, actionData }: Route.ComponentProps) {
  const { project, bench, number, values, today } = loaderData;
  const busy = useNavigation().state === "submitting";
  const sent = actionData?.lastResult.initialValue;
  const base = `/projects/${project.publicId}/benches`;
  return (
    <div className="max-w-[44rem] grid gap-6">
      <div className="grid gap-2">
        <Breadcrumbs
          items={[
            { label: "Benches", to: base },
            { label: bench.name, to: `${base}/${bench.publicId}` },
          ]}
        />
        <h2>{bench.name}, rebuilt</h2>
        <p className="soft">
          Another version, with reference sweeps of its own. Version {number} stays as it is, and so does
          every sweep that was corrected with it. Was something written down wrong, and nothing rebuilt? Then
          correct the details instead.
        </p>
      </div>
      <BridgeCaution />
      <Form method="post" encType="multipart/form-data" className="grid gap-6">
        <VersionFields
          values={sentOr(sent, values)}
          errors={actionData?.lastResult.error ?? {}}
          today={today}
          since="The day of the rebuild. Sweeps from that day on are taken with the rebuilt bench."
          remark={{
            label: "What was rebuilt, in a line",
            hint: "For instance: 200 Ω pair for the bridge arm, port moved.",
          }}
        />
        <ReferenceFiles fault={actionData?.fault} />
        <div className="grid gap-2 justify-items-start">
          {actionData && (
            <p role="alert" className="field-error">
              Nothing was stored: look at what is marked above.
            </p>
          )}
          <Button busy={busy}>{busy ? "Reading the references" : "Write the rebuilt bench down"}</Button>
        </div>
      </Form>
    </div>
  );
}
