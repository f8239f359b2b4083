import { Link } from "react-router";
import { type Column, Table } from "~/components/ui/Table";
import { formatLength, formatLengthChange } from "~/measurement/lengths";
import { formatFrequency } from "~/measurement/units";
import type { BandsData } from "../../bands-page.server";
import { offsetWords } from "./band-words";

type Row = BandsData["targets"][number];

/** How far each dip lies from its design band, and what to make of the length that it follows. */
export function TargetsTable({ data }: { data: BandsData }) {
  const { targets, project, hasDesignBands, mayEditAntenna } = data;
  const antenna = `/projects/${project}/antenna`;
  if (!hasDesignBands) {
    return (
      <p className="text-small">
        With design bands, how far each dip lies from its target stands here too
        {mayEditAntenna ? (
          <>
            : <Link to={antenna}>give them with the antenna</Link>.
          </>
        ) : (
          "."
        )}
      </p>
    );
  }
  if (targets.length === 0) return null;
  return (
    <section aria-labelledby="targets" className="grid gap-3 min-w-0">
      <h3 id="targets">From the design bands</h3>
      <Table
        caption="How far each dip lies from its design band"
        rows={targets}
        columns={columnsFor(data)}
        rowKey={({ id }) => id}
      />
      <p className="text-small soft max-w-[72ch]">
        Lengths are reckoned for the likeliest part of{" "}
        <Link to={antenna}>the antenna as it was that day</Link>, by the line through the lengths that the
        dip's trail has seen, else by proportion. Cut less than that and sweep again. Keep wires and masts
        away from power lines.
      </p>
    </section>
  );
}

function columnsFor({ project, unit }: BandsData): Column<Row>[] {
  return [
    {
      key: "dip",
      label: "Dip",
      cell: ({ publicId, frequencyHz, frequencyUncertaintyHz }) => {
        const text = formatFrequency(frequencyHz, frequencyUncertaintyHz);
        return (
          <span className="number">
            {publicId ? <Link to={`/projects/${project}/dips/${publicId}`}>{text}</Link> : text}
          </span>
        );
      },
    },
    {
      key: "band",
      label: "Nearest design band",
      cell: ({ band, inside, targetHz }) => (
        <span className="grid gap-0.5">
          <span>
            {band},{" "}
            <span className={inside ? "text-moss" : "text-clay"}>{inside ? "inside" : "outside"}</span>
          </span>
          <span className="text-tiny soft">middle {formatFrequency(targetHz)}</span>
        </span>
      ),
    },
    {
      key: "offset",
      label: "From its middle",
      numeric: true,
      cell: ({ offsetHz, share }) => offsetWords(offsetHz, share),
    },
    {
      key: "trim",
      label: "Length for the middle",
      cell: ({ trim, part, without }) => {
        if (!trim) return <span className="text-small soft">{without ? WITHOUT[without] : "unknown"}</span>;
        const { lengthM, changeM, lowM, highM, farOut, method } = trim;
        return (
          <span className="grid gap-0.5">
            <span>
              {part}: {formatLength(lengthM, unit)} ({formatLengthChange(changeM, unit)})
            </span>
            <span className="text-tiny soft">
              {lowM === null || highM === null
                ? "limits unknown"
                : `${method === "line" ? "between" : "usually between"} ${formatLength(lowM, unit)} and ${formatLength(highM, unit)}`}
              {farOut && "; far from any length tried: go half the way first"}
            </span>
          </span>
        );
      },
    },
  ];
}

const WITHOUT = {
  far: "too far off to be this band's",
  "not-described": "the antenna is not described for that day",
  "no-part": "none of the antenna's parts explains it",
} as const;
