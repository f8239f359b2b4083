import { Link, redirect } from "react-router";
import { requireProject } from "~/auth/require.server";
import { MarksProvider } from "~/components/notes/marks";
import * as sweeps from "~/db/sweeps.server";
import { refused } from "~/errors";
import { DEFAULT_SETTINGS } from "~/measurement/sweep";
import { redirectWithMessage } from "~/services/flash.server";
import { parseWas } from "~/services/merge-edit";
import { deleteSweep, keepSettings, keepTitleAndDate } from "~/services/sweep-edits.server";
import type { Route } from "./+types/sweep";
import { changeCorrection } from "./change-correction.server";
import { Advice } from "./components/Advice";
import { BandsSection } from "./components/bands/BandsSection";
import { OutsideBandsCaution } from "./components/cautions";
import { ComplexSection } from "./components/complex/ComplexSection";
import { CorrectionBar } from "./components/correction/CorrectionBar";
import { DipsTable } from "./components/DipsTable";
import { Downloads } from "./components/Downloads";
import { LimitList } from "./components/LimitList";
import { LostDips } from "./components/LostDips";
import { PictureBeside } from "./components/picture/PictureBeside";
import { SettingsForm } from "./components/SettingsForm";
import { SweepHead } from "./components/SweepHead";
import { DipThread, SweepNotes } from "./components/SweepThreads";
import { SweepView } from "./components/SweepView";
import { ViewBar } from "./components/ViewBar";
import { formErrors } from "./form-errors";
import { requireSweep } from "./require-sweep.server";
import { loadSweepPage } from "./sweep-page.server";
import { editSweepSchema, parsePlane, parseView, settingsSchema } from "./sweeps.schema";

export const meta: Route.MetaFunction = ({ data }) => [{ title: `${data?.sweep.title ?? "Sweep"} · Swale` }];

export async function loader(args: Route.LoaderArgs) {
  const asked = sweeps.findByPublicId(args.params.sweep);
  const [access] = await Promise.all([requireProject(args, "project.read"), asked]);
  const found = await requireSweep(access, args.params.sweep, asked);
  const { sweep, analysis } = found;
  if (sweep.problem || !analysis) {
    throw redirect(`/projects/${access.project.publicId}/sweeps/${sweep.publicId}/reading`);
  }
  return loadSweepPage(access, found, analysis, parseView(new URL(args.request.url).searchParams));
}

export async function action(args: Route.ActionArgs) {
  const form = await args.request.formData();
  const intent = String(form.get("intent"));
  const access = await requireProject(args, intent === "delete" ? "sweep.delete" : "sweep.edit");
  if (!access.person) throw refused("Sign in first. Nothing was changed.");
  const found = await requireSweep(access, args.params.sweep);
  const here = `/projects/${access.project.publicId}/sweeps/${found.sweep.publicId}`;
  switch (intent) {
    case "edit": {
      const parsed = editSweepSchema.safeParse({
        title: form.get("title") ?? undefined,
        takenAt: form.get("takenAt") || undefined,
      });
      if (!parsed.success) return formErrors(parsed.error.issues.map((issue) => issue.message));
      const { title, takenAt = null } = parsed.data;
      const conflict = await keepTitleAndDate(
        found.sweep,
        parseWas(form.get("was")),
        { title, takenAt },
        access.person.id,
      );
      if (conflict) return formErrors([CHANGED_MEANWHILE], 409, undefined, conflict);
      return redirectWithMessage(here, "Title and date kept.");
    }
    case "settings": {
      const parsed = settingsSchema.safeParse(Object.fromEntries(form));
      if (!parsed.success) return formErrors(parsed.error.issues.map((issue) => issue.message));
      const plane = parsePlane(form.get("plane")) ?? undefined;
      await keepSettings(found, { ...DEFAULT_SETTINGS, ...parsed.data }, access.person.id, plane);
      const search = new URL(args.request.url).searchParams;
      for (const name of ["limit", "prominence", "plane"]) search.delete(name);
      return redirectWithMessage(
        `${here}?${search}`,
        "Analysed anew; these settings are kept with the sweep.",
      );
    }
    case "bench":
    case "feedline":
    case "no-feedline":
    case "anew":
      return changeCorrection(intent, form, found, access.project.id, access.person.id, here);
    case "delete": {
      await deleteSweep(found, access.person.id);
      return redirectWithMessage(
        `/projects/${access.project.publicId}/sweeps`,
        `“${found.sweep.title}” was deleted with its original.`,
      );
    }
    default:
      return formErrors(["The form asked for something this page does not do. Nothing was changed."]);
  }
}

const CHANGED_MEANWHILE =
  "Somebody else changed title or date in the meantime. Nothing of yours was kept yet: open “Title and date” to see both and choose.";

export default function SweepPage({ loaderData, actionData }: Route.ComponentProps) {
  const { view, dips, analysis, thread } = loaderData;
  const outside = dips.some((dip) => dip.inDesignBand === false && !dip.edge);
  const swrLimit = view.swrLimit ?? analysis.settings.swrLimit;
  return (
    <MarksProvider>
      <article className="grid gap-6">
        <SweepHead data={loaderData} errors={actionData?.errors ?? []} conflict={actionData?.conflict} />
        {outside && <OutsideBandsCaution dismissed={loaderData.dismissed} />}
        <div className={thread ? "workspace workspace-open" : "workspace"}>
          <div className="grid gap-4 min-w-0 content-start">
            <ViewBar view={view} />
            <CorrectionBar data={loaderData} errors={actionData?.fields} />
            <SweepView data={loaderData} />
            <PictureBeside data={loaderData} />
            <Advice data={loaderData} />
          </div>
          <DipThread data={loaderData} />
          <div className="grid gap-6 min-w-0 content-start">
            <section aria-labelledby="dips" className="grid gap-3">
              <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-3">
                <h2 id="dips">
                  Dips as numbers{" "}
                  <Link to="/methods#dip" className="text-small font-normal font-sans">
                    How they are reckoned
                  </Link>
                </h2>
                <SettingsForm
                  view={view}
                  stored={analysis.settings}
                  storedPlane={loaderData.correction.storedPlane}
                  mayKeep={loaderData.may.edit}
                />
              </div>
              <DipsTable dips={dips} view={view} swrLimit={swrLimit} />
              <LimitList data={loaderData} />
              <LostDips data={loaderData} />
            </section>
            <BandsSection data={loaderData.inBands} />
            <ComplexSection data={loaderData.complex} {...{ dips, view, swrLimit }} />
            <Downloads data={loaderData} />
            <SweepNotes data={loaderData} />
          </div>
        </div>
      </article>
    </MarksProvider>
  );
}
