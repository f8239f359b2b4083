import { data } from "react-router";
import { requireProject } from "~/auth/require.server";
import { type Conflict, EditConflict } from "~/components/edit-conflict/EditConflict";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import * as antennas from "~/db/antennas.server";
import * as cables from "~/db/cables.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import * as steps from "~/db/steps.server";
import { NO_ANTENNA } from "~/measurement/antenna";
import { CABLES } from "~/measurement/cables";
import { bandInHertz, bandRowOf } from "~/routes/projects/band-rows";
import { BandsForm } from "~/routes/projects/components/BandsForm";
import { bandsSchema } from "~/routes/projects/project.schema";
import { changeAntenna } from "~/services/antennas.server";
import { redirectWithMessage } from "~/services/flash.server";
import { parseForm } from "~/services/parse-form";
import { changeBands } from "~/services/projects.server";
import type { Route } from "./+types/edit";
import { antennaSchema } from "./antenna.schema";
import { antennaConflict, antennaWords } from "./antenna-conflict";
import { antennaFrom, type FieldErrors, parseAntenna, sentTexts, textsOf } from "./antenna-form";
import { AntennaCautions } from "./components/AntennaCautions";
import { AntennaForm } from "./components/AntennaForm";
import { lengthUnitOf } from "./sizes";

export const meta: Route.MetaFunction = () => [{ title: "Change the antenna · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { project, person } = await requireProject(args, "antenna.edit");
  const [now, bands, sweeps, own, dismissed] = await Promise.all([
    antennas.findAt(project.id, new Date()),
    projects.findDesignBands(project.id),
    steps.findSweepsInOrder(project.id),
    cables.findAllByProject(project.id),
    person ? people.findDismissals(person.id) : [],
  ]);
  const unit = lengthUnitOf(person);
  const antenna = now?.content ?? NO_ANTENNA;
  const first = sweeps[0] && (sweeps[0].takenAt ?? sweeps[0].createdAt);
  return {
    project: { publicId: project.publicId },
    unit,
    isFirst: !now,
    texts: textsOf(antenna, unit),
    was: JSON.stringify(antenna),
    // A first description holds for the sweeps that are there already; a change is of now.
    since: now || !first ? minuteOf(new Date()) : `${first.toISOString().slice(0, 10)}T00:00`,
    cables: [...own, ...CABLES].map(({ name }) => name),
    bands: bands.map(bandRowOf),
    dismissed,
  };
}

export async function action(args: Route.ActionArgs) {
  const { project, person } = await requireProject(args, "antenna.edit");
  const form = await args.request.formData();
  const here = `/projects/${project.publicId}/antenna`;
  const intent = String(form.get("intent"));
  switch (intent) {
    case "bands": {
      const submission = parseForm(form, { schema: bandsSchema });
      if (submission.status !== "success") return data({ bands: submission.reply() }, { status: 400 });
      await changeBands(project.id, submission.value.bands.map(bandInHertz), person?.id);
      return redirectWithMessage(here, "The design bands were changed.");
    }
    case "another":
    case "keep": {
      const unit = lengthUnitOf(person);
      const submission = parseForm(form, { schema: antennaSchema(unit) });
      const sent = sentTexts(submission.payload);
      if (intent === "another") return data({ sent, errors: {}, more: true });
      if (submission.status !== "success") {
        return data({ sent, errors: submission.error ?? {} }, { status: 400 });
      }
      const { value } = submission;
      const was = parseAntenna(value.was);
      const wanted = antennaFrom(value, was, unit, newPublicId);
      const change = await changeAntenna({
        projectId: project.id,
        by: person?.id ?? null,
        was,
        wanted,
        validFrom: value.since,
        remark: value.remark,
      });
      if (change.kind === "conflict") {
        const others = { since: sent.since, remark: sent.remark, ...(value.confirm && { confirm: "on" }) };
        const question = antennaConflict({ ...change, wanted, unit, others });
        return data({ sent, errors: {}, question }, { status: 409 });
      }
      return redirectWithMessage(
        here,
        change.kind === "kept"
          ? "The antenna was changed."
          : "Nothing differs from before; nothing was kept.",
      );
    }
    default:
      return data(
        { errors: { "": ["The form asked for something this page does not do. Nothing was changed."] } },
        { status: 400 },
      );
  }
}

function minuteOf(at: Date): string {
  return at.toISOString().slice(0, 16);
}

export default function EditAntenna({ loaderData, actionData }: Route.ComponentProps) {
  const { project, isFirst, dismissed, bands } = loaderData;
  const sent = actionData && "sent" in actionData ? actionData : null;
  const question = sent && "question" in sent ? sent.question : null;
  return (
    <article className="grid gap-10 max-w-[64rem]">
      <header className="grid gap-2">
        <Breadcrumbs items={[{ label: "Antenna", to: `/projects/${project.publicId}/antenna` }]} />
        <h2 className="sweep-title">{isFirst ? "Describe the antenna" : "Change the antenna"}</h2>
        <p className="soft max-w-[72ch]">
          Lengths in metres or feet as you like: 10.14, 312 cm, 33 ft 3 1/4 in. Leave empty what is not known.
        </p>
      </header>
      <AntennaCautions dismissed={dismissed} />
      {question ? (
        <EditConflict
          key={question.conflict.was}
          intent="keep"
          conflict={question.conflict}
          labels={question.labels}
          words={wordsOf(question.conflict)}
        />
      ) : (
        <AntennaForm data={loaderData} answer={sent} errors={sent?.errors ?? actionDataErrors(actionData)} />
      )}
      <div id="bands">
        <BandsForm
          key={JSON.stringify(bands)}
          bands={bands}
          lastResult={actionData && "bands" in actionData ? actionData.bands : undefined}
        />
      </div>
    </article>
  );
}

function wordsOf({ asked }: Conflict) {
  return Object.fromEntries(asked.map(({ name }) => [name, (value: string) => antennaWords(name, value)]));
}

function actionDataErrors(actionData: Route.ComponentProps["actionData"]): FieldErrors {
  return actionData && "errors" in actionData ? (actionData.errors as FieldErrors) : {};
}
