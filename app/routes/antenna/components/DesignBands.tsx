import { Link } from "react-router";
import { formatFrequency } from "~/measurement/units";

export interface DesignBandsProps {
  bands: { publicId: string; name: string; lowHz: number; highHz: number; swrLimit: number }[];
  /** Where they are changed; null for those who may not. */
  editTo: string | null;
}

/** Where the antenna is meant to work. */
export function DesignBands({ bands, editTo }: DesignBandsProps) {
  return (
    <section aria-labelledby="design-bands" className="grid gap-3">
      <h2 id="design-bands">Design bands</h2>
      {bands.length === 0 ? (
        <p className="soft">
          Nobody has said where the antenna is meant to work.{" "}
          {editTo && <Link to={editTo}>Say its design bands</Link>}
        </p>
      ) : (
        <ul className="grid gap-1">
          {bands.map((band) => (
            <li key={band.publicId} className="flex flex-wrap gap-x-4 border-b border-rule py-2">
              <span className="font-semibold min-w-[6rem]">{band.name}</span>
              <span className="number text-small self-center">
                {formatFrequency(band.lowHz)} – {formatFrequency(band.highHz)}
              </span>
              <span className="number text-small self-center">
                SWR up to {Number(band.swrLimit.toFixed(2))}
              </span>
            </li>
          ))}
        </ul>
      )}
      {bands.length > 0 && editTo && (
        <p className="text-small no-print">
          <Link to={editTo}>Change the design bands</Link>
        </p>
      )}
    </section>
  );
}
