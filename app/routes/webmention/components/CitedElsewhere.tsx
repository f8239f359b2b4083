import { Link } from "react-router";

/** On the settings of a project: where its mentions are decided on, and how many wait. */
export function CitedElsewhere({ waiting }: { waiting: number }) {
  const word = waiting === 1 ? "One page waits for your word." : `${waiting} pages wait for your word.`;
  return (
    <section className="grid gap-2" aria-labelledby="cited">
      <h2 id="cited">Cited elsewhere</h2>
      <p>
        Other sites can say that they link to a plate or a write-up of this project.{" "}
        {waiting > 0 && <strong>{word} </strong>}
        <Link to="../mentions" relative="path">
          See who cites it
        </Link>
        .
      </p>
    </section>
  );
}
