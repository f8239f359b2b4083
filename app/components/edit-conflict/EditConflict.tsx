import { Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { Difference } from "./Difference.tsx";
import "./edit-conflict.css";

/** What `conflictOf` of the merge answers, with every value as its form sends it. */
export interface Conflict {
  /** Fields that somebody else changed meanwhile to something else. */
  asked: { name: string; mine: string; theirs: string }[];
  /** The other fields, settled by themselves. */
  rest: Record<string, string>;
  /** What is stored now, for the form's hidden "was". */
  was: string;
}

export interface EditConflictProps {
  conflict: Conflict;
  /** What each field is called on its form. */
  labels: Record<string, string>;
  /** Shows a value where that is not the value itself. */
  words?: Partial<Record<string, (value: string) => string>>;
  intent: string;
  action?: string;
}

/**
 * Two people changed one thing: the later one sees both, field by field, and chooses. It sends what the form itself would
 * send, so the action is the same; a third change in the meantime is asked about again.
 */
export function EditConflict({ conflict, labels, words = {}, intent, action }: EditConflictProps) {
  const busy = useNavigation().state === "submitting";
  return (
    <Form method="post" action={action} className="grid gap-4" aria-labelledby="conflict">
      <div role="alert" className="grid gap-1">
        <p id="conflict" className="font-semibold">
          Somebody else changed this while you did
        </p>
        <p>Nothing of yours was stored yet. Choose what shall stand; what only one of them says is marked.</p>
      </div>
      <input type="hidden" name="intent" value={intent} />
      <input type="hidden" name="was" value={conflict.was} />
      {Object.entries(conflict.rest).map(([name, value]) => (
        <input key={name} type="hidden" name={name} value={value} />
      ))}
      {conflict.asked.map(({ name, mine, theirs }) => {
        const shown = words[name] ?? ((value: string) => value);
        const sides = [
          { label: "Keep mine", value: mine, other: theirs },
          { label: "Take theirs", value: theirs, other: mine },
        ];
        return (
          <fieldset key={name} className="grid gap-2">
            <legend className="font-semibold">{labels[name] ?? name}</legend>
            <div className="conflict-sides">
              {sides.map(({ label, value, other }) => (
                <label key={label} className="conflict-side">
                  <input type="radio" name={name} value={value} defaultChecked={value === mine} />
                  {label}
                  <div>
                    <Difference text={shown(value)} against={shown(other)} />
                  </div>
                </label>
              ))}
            </div>
          </fieldset>
        );
      })}
      <div>
        <Button busy={busy}>Keep what is chosen</Button>
      </div>
    </Form>
  );
}
