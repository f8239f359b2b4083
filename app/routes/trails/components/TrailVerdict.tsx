import { Form } from "react-router";
import { Unfold } from "~/components/notes/Unfold";
import { Button } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { VerdictTag } from "~/components/ui/Tag";
import { EvidenceChoice } from "~/routes/dips/components/EvidenceChoice";
import { EvidenceList } from "~/routes/dips/components/VerdictHistory";
import { MAX_VERDICT_CHARACTERS } from "~/services/note-limits";
import type { TrailPageData } from "../trail-page.server";
import { Problems } from "./Problems.tsx";

/** What the trail is held to be, who said so, and what it was held to be before. */
export function TrailVerdict({ data, errors }: { data: TrailPageData; errors: string[] }) {
  const { trail, may, history } = data;
  const mayChange = trail.verdict === "settled" ? may.settle : may.propose;
  const form = <VerdictChange data={data} />;
  return (
    <section aria-labelledby="trail-verdict" className="grid gap-3">
      <h2 id="trail-verdict">Verdict</h2>
      {trail.verdictText ? (
        <p>
          {SAID[trail.verdict]} by {trail.verdictBy ?? "a former member"}:{" "}
          <strong className="font-semibold">{trail.verdictText}</strong>
        </p>
      ) : (
        <p className="soft">No explanation of this trail has been proposed yet.</p>
      )}
      {trail.verdict !== "open" && (
        <p className="text-small soft">
          It stands for every dip on this trail, later ones too, except where one has a later word of its own.
        </p>
      )}
      {mayChange && (
        <div className="no-print">
          <Unfold
            label={trail.verdict === "settled" ? "Reopen" : "Propose or settle"}
            about="this trail"
            bare={form}
          >
            {() => form}
          </Unfold>
        </div>
      )}
      <Problems errors={errors} />
      {(history.length > 1 || history.some(({ evidence }) => evidence.length > 0)) && (
        <ol className="grid gap-2 text-small" aria-label="Verdicts so far, newest first">
          {history.map(({ publicId, verdict, text, by, at, evidence }) => (
            <li key={publicId} className="note-line">
              <VerdictTag verdict={verdict} /> {text}{" "}
              <span className="soft">
                {by ?? "former member"}, <DateTime at={at} dateOnly />
              </span>
              <EvidenceList evidence={evidence} projectId={data.project.publicId} />
            </li>
          ))}
        </ol>
      )}
    </section>
  );
}

function VerdictChange({ data: { trail, may, evidence } }: { data: TrailPageData }) {
  const open = trail.verdict !== "settled";
  return (
    <Form method="post" className="grid gap-3 max-w-[40rem]" key={trail.verdict}>
      <input type="hidden" name="was" value={trail.verdict} />
      <label className="grid gap-1">
        <span className="text-small soft">
          {open ? "What it is, in a few words" : "Why it is open again"}
        </span>
        <input
          name="text"
          required
          maxLength={MAX_VERDICT_CHARACTERS}
          defaultValue={trail.verdict === "proposed" ? trail.verdictText : ""}
          className="control"
          autoComplete="off"
        />
      </label>
      <EvidenceChoice evidence={evidence} />
      <div className="flex flex-wrap gap-3">
        {open && may.propose && (
          <Button name="intent" value="propose" variant="quiet" size="small">
            Propose
          </Button>
        )}
        {open && may.settle && (
          <Button name="intent" value="settle" size="small">
            Settle
          </Button>
        )}
        {trail.verdict !== "open" && may.settle && (
          <Button name="intent" value="reopen" variant="quiet" size="small">
            Reopen
          </Button>
        )}
      </div>
    </Form>
  );
}

const SAID = { open: "Reopened", proposed: "Proposed", settled: "Settled" } as const;
