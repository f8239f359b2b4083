import { redirect } from "react-router";
import { findPerson } from "~/auth/require.server";
import { EmptyState } from "~/components/ui/EmptyState";
import { find, RESULT_KINDS } from "~/services/search.server";
import { describeRange, parseQuestion } from "~/services/search-question";
import type { Route } from "./+types/search";
import { Groups } from "./components/Groups.tsx";
import { NumbersForm } from "./components/NumbersForm.tsx";
import { SearchBox } from "./components/SearchBox.tsx";
import { addressOf, rangeOf, searchSchema } from "./search.schema.ts";

export const meta: Route.MetaFunction = () => [{ title: "Search · Swale" }];

/** Numbers that were said in words come into the address as numbers, so that the form and the link say the same. */
export async function loader(args: Route.LoaderArgs) {
  const person = await findPerson(args);
  const params = new URL(args.request.url).searchParams;
  const typed = Object.fromEntries(params);
  const parsed = searchSchema.safeParse(typed);
  if (!parsed.success) {
    const errors: Record<string, string[] | undefined> = parsed.error.flatten().fieldErrors;
    return { typed, errors, asked: null, groups: [], only: null };
  }
  const said = parseQuestion(parsed.data.q);
  if (said.dips) throw redirect(`/search?${addressOf(said.words, said.dips)}`);
  const range = rangeOf(parsed.data);
  const only = RESULT_KINDS.find((kind) => kind === params.get("in")) ?? null;
  const cursor = params.get("cursor") ?? undefined;
  const groups = await find({ userId: person?.id ?? null, words: said.words, dips: range, only, cursor });
  const sentence = [said.words, range ? describeRange(range) : ""].filter(Boolean).join(" ");
  return { typed, errors: NONE, asked: sentence || null, groups, only };
}

export default function Search({ loaderData }: Route.ComponentProps) {
  const { typed, errors, asked, groups, only } = loaderData;
  return (
    <div className="grid gap-8">
      <div className="grid gap-4">
        <h1>Search</h1>
        <SearchBox asked={asked ?? typed.q ?? ""} errors={errors.q} />
      </div>
      <div className="search-page">
        <NumbersForm key={JSON.stringify(typed)} typed={typed} errors={errors} />
        <div className="grid gap-8 content-start min-w-0">
          {groups.length > 0 && <Groups groups={groups} only={only} typed={typed} />}
          {groups.length === 0 && asked && (
            <EmptyState drawing="search" title="Nothing was found">
              Try fewer or shorter words, or a wider range. What you may not read is never found.
            </EmptyState>
          )}
          {groups.length === 0 && !asked && (
            <EmptyState drawing="search" title="What are you looking for?">
              Words of notes, sweeps, steps, antennas, trails, projects or people; or numbers, such as “dips
              between 50 and 54 MHz with SWR under 1.5”.
            </EmptyState>
          )}
        </div>
      </div>
    </div>
  );
}

const NONE: Record<string, string[] | undefined> = {};
