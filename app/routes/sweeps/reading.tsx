import { data, Link } from "react-router";
import { requireProject } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { LinkButton } from "~/components/ui/Button";
import type { FoundSweep } from "~/db/sweeps.server";
import { refused } from "~/errors";
import { DEFAULT_SETTINGS } from "~/measurement/sweep";
import { answer } from "~/readers/read";
import type { Given, Reading } from "~/readers/reading";
import { redirectWithMessage } from "~/services/flash.server";
import { tryReading } from "~/services/reading-preview.server";
import { keepAnswer, readAnew } from "~/services/sweep-edits.server";
import type { Route } from "./+types/reading";
import { PictureReading } from "./components/picture/PictureReading";
import { ReadingForm } from "./components/ReadingForm";
import { ReadingRows } from "./components/ReadingRows";
import { TriedView } from "./components/TriedView";
import { useTriedReading } from "./components/use-tried-reading";
import { readOriginal } from "./open-original.server";
import { keepPictureForm, loadPictureReading } from "./picture-page.server";
import { givenFromForm, type ReadingFormErrors } from "./reading.schema";
import { requireSweep } from "./require-sweep.server";

export const meta: Route.MetaFunction = ({ data }) => [
  { title: `Reading of ${data?.title ?? "a sweep"} · Swale` },
];

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  const found = await requireSweep(access, args.params.sweep);
  const { sweep, file, reading } = found;
  const isPicture = reading?.reading?.format === "screenshot";
  const picture = isPicture ? await loadPictureReading(found) : null;
  return {
    projectId: access.project.publicId,
    sweepId: sweep.publicId,
    title: sweep.title,
    unread: sweep.problem !== null,
    problem: sweep.problem,
    fileName: file.name,
    sha256: file.sha256,
    number: reading?.number ?? null,
    fixed: Object.keys(reading?.given.text ?? reading?.given.touchstone ?? reading?.given.screenshot ?? {}),
    mayEdit: access.may("sweep.edit"),
    stored: picture?.stored ?? (await tryStored(found)),
    picture,
  };
}

async function tryStored({ file, reading, analysis }: FoundSweep) {
  const bytes = await readOriginal(file.storageKey);
  const settings = analysis?.settings ?? DEFAULT_SETTINGS;
  return tryReading({ name: file.name, bytes }, reading?.given ?? {}, settings);
}

export async function action(args: Route.ActionArgs) {
  const access = await requireProject(args, "sweep.edit");
  if (!access.person) throw refused("Sign in first. Nothing was changed.");
  const found = await requireSweep(access, args.params.sweep);
  const form = await args.request.formData();
  const current = found.reading?.reading;
  if (!current) return data({ errors: { form: NOTHING_TO_CHOOSE } }, 400);
  if (current.format === "screenshot" && form.get("intent") !== "afresh") {
    const errors = await keepPictureForm(found, form, access.person.id);
    return errors ? data({ errors }, 400) : readAgain(access.project.publicId, found.sweep.publicId);
  }
  const result = givenOf(form, found.reading?.given ?? {}, current);
  if ("errors" in result) return data({ errors: result.errors }, 400);
  const settings = found.analysis?.settings ?? DEFAULT_SETTINGS;
  if (form.has("answer") && found.sweep.problem) {
    const open = await keepAnswer(found, result.given, settings, access.person.id);
    if (open)
      return redirectWithMessage(new URL(args.request.url).pathname.replace(/\.data$/, ""), ANSWER_KEPT);
    return readAgain(access.project.publicId, found.sweep.publicId);
  }
  const problem = await readAnew(found, result.given, settings, access.person.id);
  if (problem) {
    const place = problem.line
      ? ` (line ${problem.line}${problem.column ? `, column ${problem.column}` : ""})`
      : "";
    return data({ errors: { form: `${problem.message}${place} The reading was left as it was.` } }, 400);
  }
  return readAgain(access.project.publicId, found.sweep.publicId);
}

function readAgain(project: string, sweep: string) {
  return redirectWithMessage(
    `/projects/${project}/sweeps/${sweep}`,
    "Read anew. Notes and verdicts stayed with their dips.",
  );
}

/** What the pressed button asks for: an answer to one question, nothing fixed at all, or the form as it stands. */
function givenOf(form: FormData, before: Given, current: Reading) {
  const answered = form.get("answer");
  if (typeof answered === "string") {
    const [question, ...value] = answered.split("=");
    if (!current.questions.some(({ id }) => id === question)) return { errors: { form: NOT_ASKED } };
    return { given: answer(current, question, value.join("=")) };
  }
  return form.get("intent") === "afresh" ? { given: {} } : givenFromForm(form, before, current);
}

export default function ReadingPage({ loaderData, actionData }: Route.ComponentProps) {
  const { projectId, sweepId, title, stored, mayEdit, unread, picture } = loaderData;
  const base = `/projects/${projectId}/sweeps/${sweepId}`;
  const { tried, errors, busy, onChange } = useTriedReading(`${base}/reading/try`, loaderData.number);
  const shown = tried ?? stored;
  const faults: ReadingFormErrors = { ...errors, ...actionData?.errors };
  const head = (
    <div className="grid gap-1">
      {!unread && <Breadcrumbs items={[{ label: title, to: base }]} />}
      <h2>{unread ? `“${title}” is not read yet` : `How “${title}” was read`}</h2>
      <Source data={loaderData} base={base} />
    </div>
  );
  if (picture) {
    return (
      <div className="grid gap-6">
        {head}
        <PictureReading
          // The reading that is kept is what the fields begin with.
          key={`${sweepId} ${loaderData.number}`}
          data={picture}
          base={base}
          errors={actionData?.errors ?? {}}
          mayEdit={mayEdit}
          problem={loaderData.problem}
        />
      </div>
    );
  }
  return (
    <div className="grid gap-6">
      {head}
      <div className="reading-page">
        <div className="grid gap-6 content-start min-w-0">
          <TriedView tried={shown} busy={busy} />
          {shown.reading?.preview && <ReadingRows reading={shown.reading} />}
        </div>
        <div className="grid gap-4 content-start min-w-0">
          {faults.form && (
            <p role="alert" className="text-alarm">
              {faults.form}
            </p>
          )}
          {stored.reading ? (
            <ReadingForm
              // The reading that is kept is what the fields begin with.
              key={loaderData.number}
              reading={stored.reading}
              problem={shown.problem}
              errors={faults}
              mayEdit={mayEdit}
              onChange={onChange}
            />
          ) : (
            <div className="panel grid gap-3 justify-items-start">
              <p>{NOTHING_TO_CHOOSE} The original is kept and can be downloaded.</p>
              {mayEdit && (
                <LinkButton to={`/projects/${projectId}/sweeps/new`} icon="upload">
                  Add another file
                </LinkButton>
              )}
            </div>
          )}
        </div>
      </div>
    </div>
  );
}

function Source({ data, base }: { data: Route.ComponentProps["loaderData"]; base: string }) {
  return (
    <p className="text-small soft break-words">
      <Link to={`${base}/original`} reloadDocument>
        {data.fileName}
      </Link>
      , SHA-256 <span className="font-mono">{data.sha256.slice(0, 12)}…</span>
      {data.number !== null && ` · reading ${data.number}`}
      {data.fixed.length > 0 &&
        ` · ${data.fixed.length === 1 ? "one choice" : `${data.fixed.length} choices`} made by hand`}
    </p>
  );
}

const ANSWER_KEPT = "The answer is kept. Something is still open before the file can be read.";
const NOT_ASKED = "The file does not ask this any more. Nothing was changed; load the page again.";
const NOTHING_TO_CHOOSE = "Nothing of this file was understood, so there is nothing to choose.";
