import { Link } from "react-router";
import { LinkButton } from "~/components/ui/Button";
import type { PlatePageData } from "../plate-page.server";
import { Withdraw } from "./Withdraw";

/** What can be done with the plate by whoever may; for everybody, the way to what it was made of. */
export function PlateActions({ plate, errors }: { plate: PlatePageData; errors: string[] }) {
  const { may, subjectPath } = plate;
  if (!may.mend && !may.withdraw && !subjectPath) return null;
  return (
    <div className="plate-foot flex flex-wrap items-center gap-3 no-print">
      {may.mend && !plate.newer && (
        <LinkButton
          to={`${may.mend}/plates/new?mends=${plate.publicId}`}
          variant="quiet"
          size="small"
          icon="edit"
        >
          New version
        </LinkButton>
      )}
      {may.withdraw && <Withdraw number={plate.number} errors={errors} />}
      {subjectPath && (
        <Link to={subjectPath} className="text-small">
          See what it was made of, as it is now
        </Link>
      )}
      {errors.map((error) => (
        <p key={error} role="alert" className="text-alarm w-full">
          {error} Nothing was changed.
        </p>
      ))}
    </div>
  );
}
