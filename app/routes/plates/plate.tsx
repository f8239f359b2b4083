import { data } from "react-router";
import { findPerson } from "~/auth/require.server";
import { Mentions } from "~/components/mentions/Mentions";
import { clientAddressContext } from "~/context";
import { refused } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { checkAgain } from "~/services/plates/check.server";
import { withdraw } from "~/services/plates/withdraw.server";
import { takeOne } from "~/services/rate-limit.server";
import type { Route } from "./+types/plate";
import { Chain } from "./components/Chain";
import { CheckAgain } from "./components/CheckAgain";
import { Cite } from "./components/Cite";
import { Elsewhere } from "./components/Elsewhere";
import { Forms } from "./components/Forms";
import { Leaf } from "./components/Leaf";
import { People } from "./components/People";
import { PlateActions } from "./components/PlateActions";
import { Tombstone } from "./components/Tombstone";
import { NewerVersion, Versions } from "./components/Versions";
import { plateHead } from "./plate-head";
import { findPlate, loadPlatePage, loadTombstone } from "./plate-page.server";
import { withdrawSchema } from "./plates.schema";

/** Anyone who has the address reads a plate; one that was withdrawn is gone for good, and says so. */
export async function loader(args: Route.LoaderArgs) {
  const found = await findPlate(args.params.plate, await findPerson(args));
  if (found.plate.withdrawnAt) return data({ withdrawn: await loadTombstone(found), plate: null }, 410);
  return data({ withdrawn: null, plate: await loadPlatePage(found) });
}

export async function action(args: Route.ActionArgs) {
  const person = await findPerson(args);
  const found = await findPlate(args.params.plate, person);
  const form = await args.request.formData();
  const intent = String(form.get("intent"));
  if (found.plate.withdrawnAt) throw data("This plate was withdrawn. Nothing was changed.", 410);
  switch (intent) {
    case "check": {
      const waitS = await takeOne("plate-check", args.context.get(clientAddressContext));
      if (waitS !== null) {
        const problem = `It was checked often in the last minutes. Try again in ${waitS} s.`;
        return data({ checked: null, problem, errors: [] }, 429);
      }
      return { checked: await checkAgain(found.plate), problem: null, errors: [] };
    }
    case "withdraw": {
      if (!person || !found.mayWithdraw) throw refused(NOT_YOURS, person === null);
      const parsed = withdrawSchema.safeParse(Object.fromEntries(form));
      if (!parsed.success) {
        const errors = parsed.error.issues.map(({ message }) => message);
        return data({ checked: null, problem: null, errors }, 400);
      }
      await withdraw(found.plate, parsed.data.reason, person);
      return redirectWithMessage(`/plates/${found.plate.publicId}`, "The plate was withdrawn.");
    }
    default:
      throw data("The form asked for something this page does not do. Nothing was changed.", 400);
  }
}

export const meta: Route.MetaFunction = ({ data: page }) => {
  if (page?.plate) return plateHead(page.plate, page.plate.origin);
  const of = page?.withdrawn;
  return [
    { title: of ? `Plate ${of.number}, withdrawn · Swale` : "Plate · Swale" },
    { name: "robots", content: "noindex" },
  ];
};

export default function PlatePage({ loaderData, actionData }: Route.ComponentProps) {
  const { plate, withdrawn } = loaderData;
  if (withdrawn) return <Tombstone plate={withdrawn} />;
  return (
    <article className="grid gap-8 grid-cols-[minmax(0,1fr)]">
      <NewerVersion plate={plate} />
      <Elsewhere plate={plate} />
      <Leaf plate={plate} />
      <PlateActions plate={plate} errors={actionData?.errors ?? []} />
      <div className="plate-columns plate-foot">
        <div className="grid gap-8 content-start min-w-0">
          <Chain plate={plate} />
          <CheckAgain checked={actionData?.checked ?? null} problem={actionData?.problem ?? null} />
        </div>
        <div className="grid gap-8 content-start min-w-0">
          <Cite plate={plate} />
          <Forms plate={plate} />
          <People people={plate.people} />
          <Versions plate={plate} />
          <Mentions mentions={plate.mentions} />
        </div>
      </div>
    </article>
  );
}

const NOT_YOURS = "Only owners and experimenters of the plate’s project withdraw it. Nothing was changed.";
