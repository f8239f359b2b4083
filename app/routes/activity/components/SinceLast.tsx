import { Form, Link } from "react-router";
import { Button } from "~/components/ui/Button";
import type { SinceLast as Since } from "~/services/activity.server";

/** What others did since the member was last here, until it is put away. */
export function SinceLast({ projectId, since }: { projectId: string; since: Since }) {
  const activity = `/projects/${projectId}/activity`;
  return (
    <section aria-labelledby="since-last" className="panel flex flex-wrap items-center gap-x-4 gap-y-2">
      <h2 id="since-last" className="text-base">
        Since you were last here
      </h2>
      <p className="grow">
        <Link to={`${activity}?since=${since.since}`}>{since.counts.join(", ")}</Link>
      </p>
      <Form method="post" action={activity}>
        <input type="hidden" name="mark" value={since.mark} />
        <Button variant="quiet" size="small" name="intent" value="seen">
          I have seen this
        </Button>
      </Form>
    </section>
  );
}
