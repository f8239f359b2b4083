import { Form } from "react-router";
import { Button } from "~/components/ui/Button";
import { InputField } from "~/components/ui/Field";

/** One box for words and for numbers said as a sentence. */
export function SearchBox({ asked, errors }: { asked: string; errors?: string[] }) {
  return (
    <Form action="/search" role="search" aria-label="Search" className="flex flex-wrap items-end gap-3">
      <InputField
        key={asked}
        className="grow max-w-[42rem]"
        label="Words, or dips by their numbers"
        name="q"
        type="search"
        maxLength={200}
        defaultValue={asked}
        errors={errors}
      />
      <Button icon="search">Search</Button>
    </Form>
  );
}
