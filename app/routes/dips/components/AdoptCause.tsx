import { useFetcher, useLocation } from "react-router";
import { Unfold } from "~/components/notes/Unfold";
import { Button } from "~/components/ui/Button";
import { TextareaField } from "~/components/ui/Field";
import { MAX_VERDICT_CHARACTERS } from "~/services/note-limits";
import { capital } from "../advice-words";
import type { DipPageData } from "../dip-page.server";

interface AdoptCauseProps {
  data: DipPageData;
  cause: DipPageData["judgement"]["causes"][number];
}

/** One press proposes the cause as the verdict, with its arithmetic as evidence; a few words may go with it. */
export function AdoptCause({ data, cause }: AdoptCauseProps) {
  const { projectId, dip } = data;
  const fetcher = useFetcher<{ done?: string; lastResult?: { error?: Record<string, string[]> | null } }>();
  const { pathname } = useLocation();
  const problem = Object.values(fetcher.data?.lastResult?.error ?? {})[0]?.[0];
  const words = (
    <TextareaField
      label="Your words on it"
      name="note"
      rows={3}
      hint="Markdown. They go into the thread with it."
    />
  );
  return (
    <fetcher.Form
      method="post"
      action={`/projects/${projectId}/dips/${dip.publicId}/verdict`}
      className="flex flex-wrap items-start gap-x-4 gap-y-2 no-print"
    >
      <input type="hidden" name="was" value={dip.verdict} />
      <input type="hidden" name="returnTo" value={pathname} />
      <input type="hidden" name="text" value={capital(cause.title).slice(0, MAX_VERDICT_CHARACTERS)} />
      <input type="hidden" name="evidence" value={`cause:${cause.key}`} />
      <Button name="intent" value="propose" size="small" variant="quiet" busy={fetcher.state !== "idle"}>
        Adopt as proposed verdict
        <span className="sr-only">: {cause.title}</span>
      </Button>
      <Unfold label="with a note" about={`on ${cause.title}`} bare={words}>
        {() => words}
      </Unfold>
      {problem && (
        <p className="field-error basis-full" role="alert">
          {problem}
        </p>
      )}
    </fetcher.Form>
  );
}
