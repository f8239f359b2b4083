import { Form, useNavigation } from "react-router";
import { requirePerson } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { Button } from "~/components/ui/Button";
import * as runs from "~/db/bundle-runs.server";
import { brokenForm, notFound } from "~/errors";
import { askForMine, removeRun } from "~/services/bundle/runs.server";
import { redirectWithMessage } from "~/services/flash.server";
import { parseForm } from "~/services/parse-form";
import type { Route } from "./+types/my-data";
import "./bundle.css";
import { bundleSchema } from "./bundle.schema.ts";
import { RunList } from "./components/RunList.tsx";
import { shownRun } from "./shown-run.server";

export const meta: Route.MetaFunction = () => [{ title: "All my data · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const person = await requirePerson(args);
  return {
    runs: (await runs.findByUser(person.id, "mine")).map((run) => shownRun({ ...run, project: null })),
  };
}

export async function action(args: Route.ActionArgs) {
  const person = await requirePerson(args);
  const submission = parseForm(await args.request.formData(), { schema: bundleSchema });
  if (submission.status !== "success") throw brokenForm();
  const value = submission.value;
  switch (value.intent) {
    case "make": {
      const { there } = await askForMine(person.id);
      return redirectWithMessage(
        "/settings/my-data",
        there ? "It is being put together already." : "It is being put together.",
      );
    }
    case "remove": {
      const run = await runs.findByPublicId(value.run);
      if (run?.kind !== "mine" || run.userId !== person.id) throw notFound("file");
      await removeRun(run);
      return redirectWithMessage("/settings/my-data", "The file was removed. Nothing else was changed.");
    }
    default:
      return value satisfies never;
  }
}

export default function MyData({ loaderData }: Route.ComponentProps) {
  const open = loaderData.runs.some(({ state }) => state === "waiting" || state === "running");
  const busy = useNavigation().formData?.get("intent") === "make";
  return (
    <div className="max-w-[48rem] space-y-6">
      <Breadcrumbs items={[{ label: "Settings", to: "/settings" }]} />
      <h1>All my data</h1>
      <p>
        Everything that is kept of you as one ZIP: your profile, how you sign in, where you are a member, what
        you follow, your choices about mail, the names of your tokens, your notes, verdicts, steps, plates and
        write-ups, and every file you gave. Of projects with others it holds your part; an owner's bundle
        holds the whole.
      </p>
      {!open && (
        <Form method="post">
          <Button name="intent" value="make" icon="download" busy={busy}>
            Put it together
          </Button>
        </Form>
      )}
      {loaderData.runs.length > 0 && (
        <RunList
          runs={loaderData.runs}
          base="/settings/my-data"
          verb={{ doing: "It is being put together", failed: "It could not be put together" }}
        />
      )}
      <p className="soft">It is kept for 7 days, for you alone, and goes when the account is closed.</p>
    </div>
  );
}
