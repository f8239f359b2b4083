import type { SubmissionResult } from "@conform-to/react";
import { data, Form, useNavigation } from "react-router";
import { requireProject } from "~/auth/require.server";
import { type Conflict, EditConflict } from "~/components/edit-conflict/EditConflict";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { Button } from "~/components/ui/Button";
import * as benchReferences from "~/db/bench-references.server";
import * as benches from "~/db/benches.server";
import { refused } from "~/errors";
import { benchValuesOf, changeBench, correctVersion } from "~/services/benches.server";
import { redirectWithMessage } from "~/services/flash.server";
import { parseWas } from "~/services/merge-edit";
import { parseForm } from "~/services/parse-form";
import type { Route } from "./+types/edit";
import { editBenchSchema } from "./benches.schema";
import { BenchFields } from "./components/BenchFields";
import { ReferenceKinds } from "./components/ReferenceKinds";
import { VersionFields } from "./components/VersionFields";
import { pickVersion, requireOwnBench } from "./require-bench.server";
import { sentOr, versionForm } from "./version-form";
import { dayOf } from "./words";

export const meta: Route.MetaFunction = () => [{ title: "Details of a bench · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "bench.edit");
  const { bench } = await requireOwnBench(access, args.params.bench);
  const search = new URL(args.request.url).searchParams;
  const versions = await benches.findVersions(bench.id);
  const { version } = pickVersion(versions, search.get("version"));
  const references = await benchReferences.findAllByVersions([version.id]);
  return {
    project: { publicId: access.project.publicId },
    bench: { publicId: bench.publicId, name: bench.name },
    about: benchValuesOf(bench),
    version: { publicId: version.publicId, number: version.number },
    versionCount: versions.length,
    values: versionForm(version),
    references: references.map(({ kind, sweep, fileName }) => ({ kind, sweep: sweep.publicId, fileName })),
    today: dayOf(new Date()),
  };
}

export async function action(args: Route.ActionArgs) {
  const access = await requireProject(args, "bench.edit");
  const { project, person } = access;
  if (!person) throw refused("Sign in first. Nothing was changed.");
  const { bench } = await requireOwnBench(access, args.params.bench);
  const submission = parseForm(await args.request.formData(), { schema: editBenchSchema });
  if (submission.status !== "success") return answer(submission.reply(), 400);
  const value = submission.value;
  const page = `/projects/${project.publicId}/benches/${bench.publicId}`;
  switch (value.intent) {
    case "bench": {
      const { intent: _, was, ...wanted } = value;
      const conflict = await changeBench(bench, person, parseWas(was), wanted);
      if (conflict) return answer(submission.reply(), 409, conflict);
      return redirectWithMessage(page, "The bench was changed.");
    }
    case "version": {
      const { intent: _, version: publicId, kinds = {}, ...wanted } = value;
      const { version } = pickVersion(await benches.findVersions(bench.id), publicId);
      const asked = Object.values(kinds);
      if (new Set(asked).size < asked.length) {
        const formErrors = ["Two references can't be of one kind. Nothing was changed."];
        return answer(submission.reply({ formErrors }), 400);
      }
      await correctVersion(bench, version.id, person, wanted, new Map(Object.entries(kinds)));
      return redirectWithMessage(
        `${page}?version=${version.publicId}`,
        "The details were corrected. Sweeps keep the numbers they have until somebody analyses them anew.",
      );
    }
    default:
      return value satisfies never;
  }
}

function answer(lastResult: SubmissionResult<string[]>, status: number, conflict?: Conflict) {
  return data({ lastResult, conflict }, { status });
}

export default function EditBench({ loaderData, actionData }: Route.ComponentProps) {
  const { project, bench, about, version, versionCount, values, references, today } = loaderData;
  const busy = useNavigation().formData?.get("intent");
  const last = actionData?.lastResult;
  const lastOf = (intent: string) => (last?.initialValue?.intent === intent ? last : undefined);
  const [aboutLast, versionLast] = [lastOf("bench"), lastOf("version")];
  const base = `/projects/${project.publicId}/benches`;
  const conflict = actionData?.conflict;
  return (
    <div className="max-w-[44rem] grid gap-10">
      <div className="grid gap-2">
        <Breadcrumbs
          items={[
            { label: "Benches", to: base },
            { label: bench.name, to: `${base}/${bench.publicId}` },
          ]}
        />
        <h2>Details of {bench.name}</h2>
      </div>
      {conflict ? (
        <EditConflict
          key={conflict.was}
          intent="bench"
          conflict={conflict}
          labels={{ name: "Name", description: "Description", own: "It is my own" }}
        />
      ) : (
        <Form method="post" className="grid gap-6" key={`bench-${JSON.stringify(about)}`}>
          <input type="hidden" name="was" value={JSON.stringify(about)} />
          <BenchFields
            values={(aboutLast?.initialValue ?? about) as Record<string, string>}
            errors={aboutLast?.error ?? {}}
          />
          <div>
            <Button name="intent" value="bench" busy={busy === "bench"}>
              Keep this
            </Button>
          </div>
        </Form>
      )}
      <section className="grid gap-4" aria-labelledby="version-details">
        <h2 id="version-details">
          {versionCount > 1 ? `As it was in version ${version.number}` : "As it is"}
        </h2>
        <p className="soft">
          For what was written down wrong. Sweeps keep the numbers they have until somebody analyses them
          anew. Was the bench itself changed? Then write a rebuilt bench down, so that older sweeps keep
          theirs.
        </p>
        <Form
          method="post"
          action={`?version=${version.publicId}`}
          className="grid gap-6"
          key={`${version.publicId}-${JSON.stringify(values)}`}
        >
          <input type="hidden" name="version" value={version.publicId} />
          <VersionFields
            values={sentOr(versionLast?.initialValue, values)}
            errors={versionLast?.error ?? {}}
            today={today}
            since="Sweeps from that day on can be corrected with it."
            remark={{ label: "What was built or rebuilt, in a line", hint: "May stay empty." }}
          />
          <ReferenceKinds references={references} />
          {versionLast?.error?.[""]?.map((error) => (
            <p key={error} role="alert" className="field-error">
              {error}
            </p>
          ))}
          <div>
            <Button name="intent" value="version" busy={busy === "version"}>
              Keep these details
            </Button>
          </div>
        </Form>
      </section>
    </div>
  );
}
