import { Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { SelectField } from "~/components/ui/Field";
import { LICENCES } from "~/services/plates/licences";

/** The licence that the project's plates are given unless their maker chooses another. */
export function LicenceForm({ licence, errors }: { licence: string; errors?: string[] }) {
  const busy = useNavigation().formData?.get("intent") === "licence";
  return (
    <section className="space-y-3">
      <h2>Plates</h2>
      <Form method="post" className="max-w-[42rem] space-y-5">
        <SelectField
          label="Licence proposed for new plates"
          hint="What others may do with a plate. Plates that are made keep the licence they have."
          name="licence"
          key={licence}
          defaultValue={licence}
          errors={errors}
          options={LICENCES.map(({ id, name }) => ({ value: id, label: name }))}
        />
        <Button name="intent" value="licence" busy={busy}>
          Keep this licence
        </Button>
      </Form>
    </section>
  );
}
