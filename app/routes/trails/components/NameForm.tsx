import { Form } from "react-router";
import { Unfold } from "~/components/notes/Unfold";
import { Button } from "~/components/ui/Button";
import { Problems } from "./Problems.tsx";

/** A trail's name, kept or taken away. */
export function NameForm({ name, errors }: { name: string; errors: string[] }) {
  const form = (
    <Form method="post" className="flex flex-wrap items-end gap-3">
      <input type="hidden" name="intent" value="name" />
      <label className="grid gap-1">
        <span className="text-small soft">Name; empty for none</span>
        <input name="name" defaultValue={name} maxLength={80} className="control" autoComplete="off" />
      </label>
      <Button size="small">Keep the name</Button>
    </Form>
  );
  return (
    <div className="no-print">
      <Unfold label={name ? "Rename" : "Name this trail"} about="this trail" bare={form}>
        {() => form}
      </Unfold>
      <Problems errors={errors} />
    </div>
  );
}
