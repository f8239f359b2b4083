import { data, Form, useNavigation } from "react-router";
import { requireProject } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { Button, LinkButton } from "~/components/ui/Button";
import { InputField } from "~/components/ui/Field";
import * as writeUps from "~/db/write-ups.server";
import { env } from "~/env.server";
import { notFound } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { parseForm } from "~/services/parse-form";
import { licenceOf } from "~/services/plates/licences";
import { drawDraft } from "~/services/write-ups/preview.server";
import { type Published, publish, revisionOf, takeBack } from "~/services/write-ups/publish.server";
import type { Route } from "./+types/publish";
import { ArticleText } from "./components/ArticleText.tsx";
import { requireWriteUp } from "./require-write-up.server.ts";
import { publishSchema } from "./write-ups.schema.ts";

export const meta: Route.MetaFunction = ({ data }) => [
  { title: `Publish ${data?.title ?? "a write-up"} · Swale` },
];

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "write-up.edit");
  const { project } = access;
  const { writeUp } = await requireWriteUp(access, args.params.writeUp);
  const [lastNumber, drawn] = await Promise.all([
    writeUps.findLastNumber(writeUp.id),
    drawDraft(access, writeUp.body, true),
  ]);
  return {
    project: { publicId: project.publicId, title: project.title, visibility: project.visibility },
    publicId: writeUp.publicId,
    title: writeUp.title,
    empty: writeUp.body.trim() === "",
    address: `${env.BASE_URL}/write-ups/${writeUp.publicId}`,
    licence: licenceOf(project.licence)?.name ?? project.licence,
    revision: revisionOf(writeUp),
    next: lastNumber + 1,
    html: drawn.html,
  };
}

export async function action(args: Route.ActionArgs) {
  const access = await requireProject(args, "write-up.edit");
  const { project, person } = access;
  const { writeUp } = await requireWriteUp(access, args.params.writeUp);
  const submission = parseForm(await args.request.formData(), { schema: publishSchema });
  if (submission.status !== "success") return data({ problem: "That form was not understood." }, 400);
  const value = submission.value;
  const page = `/write-ups/${writeUp.publicId}`;
  switch (value.intent) {
    case "publish": {
      const outcome = await publish(writeUp, project, person, value);
      if (outcome.kind === "gone") throw notFound("write-up");
      if (outcome.kind !== "published") return data({ problem: PROBLEMS[outcome.kind] }, 409);
      return redirectWithMessage(page, `Published as version ${outcome.number}.`);
    }
    case "take-back": {
      const back = `/projects/${project.publicId}${page}/edit`;
      const done = await takeBack(writeUp, person);
      return redirectWithMessage(
        back,
        done ? "It is taken back; its address says so." : "It was not published.",
      );
    }
    default:
      return value satisfies never;
  }
}

export default function PublishWriteUp({ loaderData, actionData }: Route.ComponentProps) {
  const { project, publicId, title, empty, address, licence, revision, next, html } = loaderData;
  const busy = useNavigation().state === "submitting";
  const base = `/projects/${project.publicId}/write-ups`;
  return (
    <article className="grid gap-6">
      <header className="grid gap-2">
        <Breadcrumbs
          items={[
            { label: "Write-ups", to: base },
            { label: title, to: `${base}/${publicId}/edit` },
          ]}
        />
        <h2 className="sweep-title">Publish version {next}</h2>
      </header>
      <section className="panel grid gap-3 max-w-[72ch]" aria-label="What publishing does">
        <p>
          Anyone with the address <span className="provenance break-all">{address}</span> reads it then,
          without signing in
          {project.visibility === "private" ? (
            <strong>, although this project is private</strong>
          ) : (
            ", and it is listed in the project"
          )}
          : the text, the figures and numbers below, your name, and the project's title. Nothing else of the
          project is opened by it.
        </p>
        <p>
          Figures and numbers are kept as they are now, under {licence}. A published version is never changed;
          publish the next one, or take it back. What others copied stays with them.
        </p>
        {actionData && (
          <p role="alert" className="text-alarm font-semibold">
            {actionData.problem}
          </p>
        )}
        {empty ? (
          <p>There is no text in it yet.</p>
        ) : (
          <Form method="post" className="grid gap-3">
            <input type="hidden" name="revision" value={revision} />
            <InputField
              name="remark"
              label={next === 1 ? "A remark, if you like" : "What changed, in a line"}
              maxLength={300}
            />
            <div className="flex flex-wrap gap-3">
              <Button name="intent" value="publish" busy={busy}>
                Publish it
              </Button>
              <LinkButton to={`${base}/${publicId}/edit`} variant="quiet">
                Go on writing
              </LinkButton>
            </div>
          </Form>
        )}
      </section>
      <section aria-label="What will be published" className="grid gap-4">
        <p className="write-up-title font-semibold">{title}</p>
        <ArticleText html={html} />
      </section>
    </article>
  );
}

const PROBLEMS: Record<Exclude<Published["kind"], "published" | "gone">, string> = {
  "changed-since":
    "Somebody wrote in it since you looked at it. Nothing was published; look at it again below.",
  "same-as-published": "This is what is published already, word for word. Nothing was changed.",
  "too-large":
    "Its figures are too large to be kept together. Nothing was published; take some out, or make plates of them.",
};
