import type { ReactNode } from "react";
import { Form, Link } from "react-router";
import { Button, LinkButton } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { EmptyState } from "~/components/ui/EmptyState";
import type { Subjects } from "../subjects.server";

/** Everything of the project that can become a plate. */
export function Chooser({ projectId, subjects }: { projectId: string; subjects: Subjects }) {
  const { sweeps, trails, benches } = subjects;
  const base = `/projects/${projectId}`;
  const to = (from: string) => `${base}/plates/new?from=${from}`;
  if (sweeps.length + benches.length === 0) {
    return (
      <EmptyState
        drawing="sweeps"
        title="There is nothing to show yet"
        action={<LinkButton to={`${base}/sweeps/new`}>Add the first sweep</LinkButton>}
      >
        A plate is made from a sweep, its dips, or what became of them.
      </EmptyState>
    );
  }
  return (
    <div className="grid gap-8">
      {sweeps.length > 0 && (
        <Part id="of-project" title="The whole project">
          <p>
            <Link to={to("strip")}>The strip map</Link>: every sweep on one frequency axis, and what moved.
          </p>
        </Part>
      )}
      {sweeps.length > 0 && (
        <Part id="of-sweeps" title="One sweep, or several laid over one another">
          <Form method="get" className="grid gap-3 justify-items-start">
            <ul className="plate-choice">
              {sweeps.map(({ publicId, title, takenAt }) => (
                <li key={publicId}>
                  <input type="checkbox" name="sweep" value={publicId} aria-label={`Compare ${title}`} />
                  <span className="plate-choice-words">
                    <Link to={to(`sweep:${publicId}`)}>{title}</Link>
                    {takenAt && (
                      <span className="text-small soft">
                        <DateTime at={takenAt} dateOnly />
                      </span>
                    )}
                  </span>
                </li>
              ))}
            </ul>
            {sweeps.length > 1 && (
              <Button variant="quiet" size="small">
                Lay the ticked ones over one another
              </Button>
            )}
          </Form>
          <p className="text-small soft max-w-[72ch]">
            For one dip, open its page and choose “Make a plate” there.
          </p>
        </Part>
      )}
      {trails.length > 0 && (
        <Part id="of-trails" title="A trail: one dip from sweep to sweep">
          <Links items={trails} to={(id) => to(`trail:${id}`)} />
        </Part>
      )}
      {benches.length > 0 && (
        <Part id="of-benches" title="A bench and what it can do">
          <Links items={benches} to={(id) => to(`bench:${id}`)} />
        </Part>
      )}
    </div>
  );
}

function Part({ id, title, children }: { id: string; title: string; children: ReactNode }) {
  return (
    <section aria-labelledby={id} className="grid gap-2">
      <h3 id={id}>{title}</h3>
      {children}
    </section>
  );
}

function Links({
  items,
  to,
}: {
  items: { publicId: string; title: string }[];
  to: (publicId: string) => string;
}) {
  return (
    <ul className="plate-choice">
      {items.map(({ publicId, title }) => (
        <li key={publicId}>
          <Link to={to(publicId)}>{title}</Link>
        </li>
      ))}
    </ul>
  );
}
