import { data, Form } from "react-router";
import { requirePerson } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { Button } from "~/components/ui/Button";
import { FieldGroup } from "~/components/ui/Field";
import * as runs from "~/db/bundle-runs.server";
import { brokenForm, notFound } from "~/errors";
import { CutShort, fileOfForm } from "~/services/bundle/multipart";
import { giveBundle, removeRun } from "~/services/bundle/runs.server";
import { redirectWithMessage } from "~/services/flash.server";
import { log } from "~/services/log.server";
import { parseForm } from "~/services/parse-form";
import type { Route } from "./+types/take-in";
import "./bundle.css";
import { bundleSchema } from "./bundle.schema.ts";
import { RunList } from "./components/RunList.tsx";
import { shownRun } from "./shown-run.server";

export const meta: Route.MetaFunction = () => [{ title: "Take a bundle in · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const person = await requirePerson(args, "project.create");
  return { runs: (await runs.findByUser(person.id, "import")).map(shownRun) };
}

export async function action(args: Route.ActionArgs) {
  const person = await requirePerson(args, "project.create");
  const { request } = args;
  const type = request.headers.get("Content-Type") ?? "";
  if (!/^multipart\/form-data/i.test(type)) return clear(request, person.id);
  const file = request.body && (await fileOfForm(chunksOf(request.body), type));
  if (!file) return data({ problem: NO_FILE }, { status: 400 });
  try {
    const given = await giveBundle(person.id, file.bytes);
    switch (given.kind) {
      case "given":
        return redirectWithMessage("/projects/take-in", "The bundle is here and is being looked at.");
      case "too-large":
        return data({ problem: TOO_LARGE }, { status: 413 });
      case "too-many":
        return data({ problem: TOO_MANY }, { status: 409 });
      default:
        return given satisfies never;
    }
  } catch (error) {
    log.warn({ err: error }, "a bundle did not arrive whole");
    return error instanceof CutShort
      ? data({ problem: CUT }, { status: 400 })
      : data({ problem: NO_STORE }, { status: 503 });
  }
}

async function clear(request: Request, userId: number) {
  const submission = parseForm(await request.formData(), { schema: bundleSchema });
  if (submission.status !== "success" || submission.value.intent !== "remove") throw brokenForm();
  const run = await runs.findByPublicId(submission.value.run);
  if (run?.kind !== "import" || run.userId !== userId) throw notFound("line");
  await removeRun(run);
  return redirectWithMessage("/projects/take-in", "The line was cleared. Projects are as they were.");
}

async function* chunksOf(body: ReadableStream<Uint8Array>): AsyncGenerator<Uint8Array> {
  const reader = body.getReader();
  for (let got = await reader.read(); !got.done; got = await reader.read()) yield got.value;
}

const NO_FILE = "No file came. Nothing was stored; choose the bundle's ZIP and send it again.";
const TOO_LARGE = "It has more than 2 GB. Nothing was stored.";
const TOO_MANY = "Three bundles of yours are being looked at. Nothing was stored; wait until one is done.";
const CUT = "The file did not arrive whole. Nothing was stored; send it again.";
const NO_STORE = "It could not be stored just now. Nothing of it was kept; send it again in a minute.";

export default function TakeIn({ loaderData, actionData }: Route.ComponentProps) {
  return (
    <div className="max-w-[48rem] space-y-6">
      <Breadcrumbs items={[{ label: "Projects", to: "/projects" }]} />
      <h1>Take a bundle in</h1>
      <p className="max-w-[72ch]">
        A bundle becomes a project of yours: private at first, with you as its owner. All of it is checked
        before anything is written; one that is damaged, or not a bundle, leaves nothing behind.
      </p>
      <Form method="post" encType="multipart/form-data" reloadDocument className="space-y-4">
        {actionData?.problem && (
          <p role="alert" className="field-error">
            {actionData.problem}
          </p>
        )}
        <FieldGroup legend="The bundle">
          <input
            type="file"
            className="bundle-file"
            name="bundle"
            accept=".zip,application/zip"
            required
            aria-label="The bundle's ZIP"
          />
          <p className="soft text-small">A ZIP as it was downloaded, at most 2 GB.</p>
        </FieldGroup>
        <Button icon="upload">Send and check</Button>
      </Form>
      {loaderData.runs.length > 0 && (
        <RunList
          runs={loaderData.runs}
          base="/projects/take-in"
          verb={{
            doing: "Checked and taken in",
            failed: "It was not taken in. Nothing was written.",
          }}
        />
      )}
      <section className="space-y-2">
        <h2>What becomes of the rest</h2>
        <p className="soft max-w-[72ch]">
          The others in it are kept by name, marked “from a bundle”: they have no account by that. Numbers,
          points and files are exactly those of the bundle. What has an address that is taken here gets a new
          one, also where notes name it. A plate shows the address where it was made, which is where it is
          cited.
        </p>
      </section>
    </div>
  );
}
