import { Form } from "react-router";
import { Button } from "~/components/ui/Button";

/** For those who come by the address: an address alone signs nobody out. */
export function SignOutPage() {
  return (
    <div className="mx-auto max-w-[34rem] space-y-4 pt-4">
      <h1>Sign out</h1>
      <p className="soft">This ends the session of this browser only. Others stay; settings lists them.</p>
      <Form method="post" action="/sign-out" reloadDocument>
        <Button>Sign out</Button>
      </Form>
    </div>
  );
}
