import { Form } from "react-router";
import { Button } from "~/components/ui/Button";
import { Dialog } from "~/components/ui/Dialog";
import { InputField } from "~/components/ui/Field";

/** Asks once, and for the reason: a plate that is withdrawn never comes back. */
export function Withdraw({ number, errors }: { number: number; errors: string[] }) {
  return (
    <Dialog label="Withdraw" variant="danger" size="small" icon="remove" title={`Withdraw plate ${number}?`}>
      <p>
        The figure and its numbers are shown no more, in no form and on no other site. Its address stays and
        says that it was withdrawn, when, and why. This can’t be undone. For a mistake, make a new version
        instead: the old one then points to it.
      </p>
      <Form method="post" className="grid gap-4">
        <InputField
          label="Why"
          hint="Anyone who follows the address reads this."
          name="reason"
          required
          maxLength={500}
          errors={errors}
          autoComplete="off"
        />
        <div>
          <Button variant="danger" name="intent" value="withdraw">
            Withdraw the plate
          </Button>
        </div>
      </Form>
    </Dialog>
  );
}
