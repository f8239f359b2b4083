import { getFormProps, getInputProps, type SubmissionResult, useForm } from "@conform-to/react";
import { getZodConstraint, parseWithZod } from "@conform-to/zod/v4";
import { type ReactNode, useEffect, useId, useRef } from "react";
import { useFetcher, useLocation } from "react-router";
import { Button } from "~/components/ui/Button";
import { InputField } from "~/components/ui/Field";
import { useToast } from "~/components/ui/Toast";
import { Unfold } from "./Unfold.tsx";
import { verdictSchema } from "./verdict.schema.ts";

export interface VerdictFormProps {
  /** Public ids. */
  projectId: string;
  dipId: string;
  verdict: "open" | "proposed" | "settled";
  verdictText: string;
  /** Name of who gave it. */
  verdictBy: string | null;
  may: { propose: boolean; settle: boolean };
  /** Controls named `evidence`, where there is something to choose. */
  evidence?: ReactNode;
}

/** What the dip is held to be, and what the person may do about it. */
export function VerdictForm(props: VerdictFormProps) {
  const { verdict, verdictText, verdictBy, may } = props;
  const who = verdictBy ?? "a former member";
  const mayChange = verdict === "settled" ? may.settle : may.propose;
  return (
    <div className="grid gap-2">
      <p>
        {verdictText ? (
          <>
            {SAID[verdict]} by {who}: <strong className="font-semibold">{verdictText}</strong>
          </>
        ) : (
          <span className="soft">No explanation has been proposed yet.</span>
        )}
      </p>
      {mayChange && (
        <Unfold label={LABEL[verdict]} about="for this dip" bare={<Change {...props} />}>
          {(close) => <Change {...props} onDone={close} />}
        </Unfold>
      )}
    </div>
  );
}

interface Answer {
  done?: keyof typeof DONE;
  lastResult?: SubmissionResult<string[]>;
}

function Change({ onDone, ...props }: VerdictFormProps & { onDone?: () => void }) {
  const { projectId, dipId, verdict, verdictText, may, evidence } = props;
  const fetcher = useFetcher<Answer>();
  const { show } = useToast();
  const { pathname, search } = useLocation();
  const [form, fields] = useForm({
    id: useId(),
    lastResult: fetcher.state === "idle" ? fetcher.data?.lastResult : null,
    defaultValue: { text: verdict === "proposed" ? verdictText : "" },
    constraint: getZodConstraint(verdictSchema),
    shouldRevalidate: "onInput",
    onValidate: ({ formData }) => parseWithZod(formData, { schema: verdictSchema }),
  });
  const told = useRef<unknown>(null);
  useEffect(() => {
    const done = fetcher.data?.done;
    if (!done || told.current === fetcher.data) return;
    told.current = fetcher.data;
    show({ id: `verdict-${dipId}-${done}`, text: DONE[done] });
    onDone?.();
  });
  const busy = fetcher.state !== "idle";
  return (
    <fetcher.Form
      method="post"
      action={`/projects/${projectId}/dips/${dipId}/verdict`}
      {...getFormProps(form)}
      className="grid gap-2"
    >
      <input type="hidden" name="was" value={verdict} />
      <input type="hidden" name="returnTo" value={pathname + search} />
      <InputField
        label={verdict === "settled" ? "Why it is open again" : "The explanation in a few words"}
        errors={fields.text.errors ?? form.errors}
        {...getInputProps(fields.text, { type: "text" })}
      />
      {evidence}
      <div className="flex flex-wrap gap-2">
        {verdict !== "settled" && (
          <Button
            name="intent"
            value="propose"
            size="small"
            variant={may.settle ? "quiet" : "primary"}
            busy={busy}
          >
            Propose it
          </Button>
        )}
        {verdict !== "settled" && may.settle && (
          <Button name="intent" value="settle" size="small" busy={busy}>
            Settle it
          </Button>
        )}
        {verdict !== "open" && may.settle && (
          <Button name="intent" value="reopen" size="small" variant="quiet" busy={busy}>
            Open it again
          </Button>
        )}
      </div>
    </fetcher.Form>
  );
}

const SAID = { open: "Opened again", proposed: "Proposed", settled: "Settled" } as const;
const LABEL = { open: "Explain it", proposed: "Answer the proposal", settled: "Open it again" } as const;
const DONE = {
  propose: "The explanation is proposed.",
  settle: "The dip is settled.",
  reopen: "The dip is open again.",
} as const;
