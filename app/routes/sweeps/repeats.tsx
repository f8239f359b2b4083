import { Form, Link, useNavigation } from "react-router";
import { requireProject } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { Button } from "~/components/ui/Button";
import { CheckboxField } from "~/components/ui/Field";
import { formatDate } from "~/services/dates";
import { redirectWithMessage } from "~/services/flash.server";
import { groupRepeats, leaveRepeats } from "~/services/repeats.server";
import type { Route } from "./+types/repeats";
import { RepeatFindings } from "./components/repeats/RepeatFindings";
import { formErrors } from "./form-errors";
import { loadRepeats } from "./repeats-page.server";
import { requireSweep } from "./require-sweep.server";

export const meta: Route.MetaFunction = ({ data }) => [
  { title: `Repeats of ${data?.sweep.title ?? "a sweep"} · Swale` },
];

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  const found = await requireSweep(access, args.params.sweep);
  return {
    project: { publicId: access.project.publicId },
    sweep: { publicId: found.sweep.publicId, title: found.sweep.title },
    mayEdit: access.may("sweep.edit"),
    ...(await loadRepeats(access, found)),
  };
}

export async function action(args: Route.ActionArgs) {
  const { project, ...access } = await requireProject(args, "sweep.edit");
  const { sweep } = await requireSweep({ project, ...access }, args.params.sweep);
  const form = await args.request.formData();
  const here = `/projects/${project.publicId}/sweeps/${sweep.publicId}/repeats`;
  switch (form.get("intent")) {
    case "group": {
      const others = form.getAll("sweep").map(String);
      if (!(await groupRepeats(project.id, [sweep.publicId, ...others], access.person?.id)))
        return formErrors(["Choose at least one other sweep of the same thing. Nothing was changed."]);
      return redirectWithMessage(here, "These sweeps are repeats of one another now.");
    }
    case "leave":
      await leaveRepeats(sweep, access.person?.id);
      return redirectWithMessage(here, `“${sweep.title}” stands on its own again.`);
    default:
      return formErrors(["The form asked for something this page does not do. Nothing was changed."]);
  }
}

export default function Repeats({ loaderData, actionData }: Route.ComponentProps) {
  const { project, sweep, mayEdit, group, candidates, findings } = loaderData;
  const base = `/projects/${project.publicId}/sweeps`;
  const busy = useNavigation().state === "submitting";
  return (
    <article className="grid gap-8">
      <header className="grid gap-2">
        <Breadcrumbs
          items={[
            { label: "Sweeps", to: base },
            { label: sweep.title, to: `${base}/${sweep.publicId}` },
          ]}
        />
        <h2>Repeats</h2>
        <p className="soft max-w-[72ch]">
          Several sweeps of the same thing, with nothing changed between them: how far they lie apart is how
          well the numbers can be had again.
        </p>
      </header>
      {actionData?.errors.map((error) => (
        <p key={error} role="alert" className="text-alarm">
          {error}
        </p>
      ))}
      {findings ? (
        <RepeatFindings findings={findings} group={group} base={base} />
      ) : (
        <p>“{sweep.title}” is not a repeat of another sweep yet.</p>
      )}
      {mayEdit && candidates.length > 0 && (
        <section aria-labelledby="choose" className="grid gap-3">
          <h2 id="choose">{findings ? "Add more of the same" : "Choose the others"}</h2>
          <Form method="post" className="grid gap-3 justify-items-start">
            <input type="hidden" name="intent" value="group" />
            <ul className="grid gap-1">
              {candidates.map(({ publicId, title, takenAt }) => (
                <li key={publicId}>
                  <CheckboxField
                    label={
                      <>
                        {title}{" "}
                        <span className="soft text-small">
                          {takenAt ? formatDate(new Date(takenAt)) : "date not said"}
                        </span>
                      </>
                    }
                    name="sweep"
                    value={publicId}
                  />
                </li>
              ))}
            </ul>
            <Button busy={busy}>They are repeats of this one</Button>
          </Form>
        </section>
      )}
      {mayEdit && findings && (
        <Form method="post">
          <input type="hidden" name="intent" value="leave" />
          <Button variant="quiet" size="small">
            Take this sweep out
          </Button>
        </Form>
      )}
      {!findings && candidates.length === 0 && (
        <p className="soft">
          No other sweep of this project covers its range. <Link to={`${base}/new`}>Sweep it once more</Link>{" "}
          and send it in.
        </p>
      )}
    </article>
  );
}
