import { data, Link, useRouteLoaderData } from "react-router";
import { requirePerson } from "~/auth/require.server";
import { ThemeSwitch } from "~/components/ThemeSwitch";
import * as people from "~/db/people.server";
import * as sessions from "~/db/sessions.server";
import type { loader as rootLoader } from "~/root";
import { redirectWithMessage } from "~/services/flash.server";
import { parseForm } from "~/services/parse-form";
import { changeProfile } from "~/services/people.server";
import type { Route } from "./+types/settings";
import { settingsSchema } from "./account.schema.ts";
import { LengthsForm } from "./components/LengthsForm.tsx";
import { ProfileForm } from "./components/ProfileForm.tsx";
import { SessionList } from "./components/SessionList.tsx";

export const meta: Route.MetaFunction = () => [{ title: "Settings · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const person = await requirePerson(args);
  const rows = await sessions.findAllByUser(person.id);
  return {
    person: {
      name: person.name,
      userName: person.userName,
      callSign: person.callSign,
      ituRegion: person.ituRegion === null ? "" : String(person.ituRegion),
      timeZone: person.timeZone,
      email: person.email,
    },
    timeZones: ["UTC", ...Intl.supportedValuesOf("timeZone").filter((zone) => zone !== "UTC")],
    lengthUnit: person.lengthUnit,
    sessions: rows.map((row) => ({
      id: row.id,
      userAgent: row.userAgent,
      createdAt: row.createdAt.toISOString(),
      lastSeenAt: row.lastSeenAt.toISOString(),
      current: row.id === person.sessionId,
    })),
  };
}

export async function action(args: Route.ActionArgs) {
  const person = await requirePerson(args);
  const submission = parseForm(await args.request.formData(), { schema: settingsSchema });
  if (submission.status !== "success") return data({ lastResult: submission.reply() }, { status: 400 });
  const value = submission.value;
  switch (value.intent) {
    case "profile": {
      const { intent: _, ...profile } = value;
      if (!(await changeProfile(person.id, profile))) {
        const fieldErrors = {
          userName: ["Somebody has this user name. Choose another; yours is unchanged."],
        };
        return data({ lastResult: submission.reply({ fieldErrors }) }, { status: 409 });
      }
      return redirectWithMessage("/settings", "Your profile was changed.");
    }
    case "lengths":
      await people.update(person.id, { lengthUnit: value.lengthUnit });
      return redirectWithMessage("/settings", "Lengths are shown so from now on.");
    case "revoke-session":
      await sessions.deleteByUser(person.id, value.session);
      return redirectWithMessage("/settings", "That session was ended.");
    case "revoke-others":
      await sessions.deleteOthers(person.id, person.sessionId);
      return redirectWithMessage("/settings", "All other sessions were ended.");
    default:
      return value satisfies never;
  }
}

export default function Settings({ loaderData, actionData }: Route.ComponentProps) {
  const root = useRouteLoaderData<typeof rootLoader>("root");
  return (
    <div className="max-w-[48rem] space-y-10">
      <h1>Settings</h1>
      <ProfileForm
        person={loaderData.person}
        timeZones={loaderData.timeZones}
        lastResult={actionData?.lastResult}
      />
      <section className="space-y-3">
        <h2>Colours</h2>
        <div className="max-w-[24rem]">
          <ThemeSwitch choice={root?.theme ?? "system"} />
        </div>
      </section>
      <LengthsForm lengthUnit={loaderData.lengthUnit} />
      <section className="space-y-3">
        <h2>Signing in</h2>
        <p>
          <Link to="/settings/sign-in">How you sign in</Link>{" "}
          <span className="soft">and where mails go: GitHub, e-mail addresses, or both.</span>
        </p>
      </section>
      <section className="space-y-3">
        <h2>Others</h2>
        <p>
          <Link to="/settings/blocked">People you blocked</Link>{" "}
          <span className="soft">are folded away and can't reach you.</span>
        </p>
      </section>
      <section className="space-y-3">
        <h2>Mails</h2>
        <p>
          <Link to="/settings/mail">How often mails come</Link>{" "}
          <span className="soft">at once, by the hour, by the day, or none; also by project.</span>
        </p>
      </section>
      <section className="space-y-3">
        <h2>Scripts</h2>
        <p>
          <Link to="/settings/tokens">Tokens for scripts</Link>{" "}
          <span className="soft">let a program read, or take sweeps in, in your name.</span>
        </p>
      </section>
      <SessionList sessions={loaderData.sessions} />
      <section className="space-y-3">
        <h2>Leaving</h2>
        <p>
          <Link to="/settings/my-data">All my data</Link>{" "}
          <span className="soft">as one file to take along.</span>
        </p>
        <p>
          <Link to="/settings/close">Close the account</Link>{" "}
          <span className="soft">for good; your notes stay or go, as you choose.</span>
        </p>
      </section>
    </div>
  );
}
