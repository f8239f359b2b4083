import { Link } from "react-router";
import { DateTime } from "~/components/ui/DateTime";

export interface Withdrawn {
  number: number;
  version: number;
  title: string;
  at: Date;
  reason: string;
  /** Address of a newer version that is not withdrawn. */
  newer: string | null;
}

/** What stays at the address of a plate that was withdrawn. */
export function Tombstone({ plate }: { plate: Withdrawn }) {
  return (
    <article className="plate-leaf">
      <div className="plate-sheet">
        <header className="plate-head">
          <p className="plate-number">
            Plate {plate.number}
            {plate.version > 1 && `, version ${plate.version}`}
          </p>
          <h1>{plate.title}</h1>
        </header>
        <div className="plate-caption grid gap-3 justify-items-center text-center">
          <p className="font-semibold">
            Withdrawn on <DateTime at={plate.at} dateOnly />.
          </p>
          <p className="break-words">{plate.reason}</p>
          <p className="plate-small">
            Its figure and numbers are not shown any more. The address stays, so that whoever cited it finds
            out.
          </p>
          {plate.newer && (
            <p>
              <Link to={plate.newer}>A newer version of this plate stands</Link>.
            </p>
          )}
        </div>
      </div>
    </article>
  );
}
