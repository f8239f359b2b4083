import type { ReactNode } from "react";
import { type Column, Table } from "~/components/ui/Table";
import type { Antenna, AntennaElement } from "~/measurement/antenna";
import { formatLength, type LengthUnit } from "~/measurement/lengths";
import { KIND_WORDS } from "~/services/antenna-words";

interface PartsProps {
  antenna: Antenna;
  unit: LengthUnit;
}

/** The conductors, a row each. */
export function Elements({ antenna, unit }: PartsProps) {
  if (antenna.elements.length === 0) return <p className="soft">No elements are described.</p>;
  return (
    <Table
      caption="Elements"
      rows={antenna.elements}
      rowKey={({ key }) => key}
      rowId={({ key }) => `element-${key}`}
      columns={columnsFor(unit)}
    />
  );
}

function columnsFor(unit: LengthUnit): Column<AntennaElement>[] {
  return [
    {
      key: "name",
      label: "Element",
      cell: ({ name, kind, count }) => (
        <>
          <span className="font-semibold">{name || KIND_WORDS[kind]}</span>
          {name && <span className="soft"> {KIND_WORDS[kind]}</span>}
          {count > 1 && <span className="number"> ×{count}</span>}
        </>
      ),
    },
    { key: "length", label: "Length", numeric: true, cell: ({ lengthM }) => size(lengthM, unit) },
    { key: "height", label: "Height", numeric: true, cell: ({ heightM }) => size(heightM, unit) },
    {
      key: "diameter",
      label: "Diameter",
      numeric: true,
      cell: ({ diameterMm }) =>
        diameterMm === null ? UNSAID : `${Number(diameterMm.toPrecision(4))}\u2009mm`,
    },
    { key: "material", label: "Material", cell: (element) => materialOf(element) },
    { key: "where", label: "Where", cell: ({ where }) => where || UNSAID },
  ];
}

/** Feedline, choke, ground and what else is to be said. */
export function OtherParts({ antenna, unit }: PartsProps) {
  const { feedline, choke, ground, remarks } = antenna;
  return (
    <dl className="grid">
      <Row label="Feedline">
        {feedline ? (
          <>
            <span className="number">{size(feedline.lengthM, unit)}</span> of{" "}
            {feedline.cable ?? "a cable not said"}
            {feedline.velocityFactor !== null && (
              <>
                , velocity factor <span className="number">{feedline.velocityFactor}</span>
              </>
            )}
            {feedline.route && <>. {feedline.route}</>}
          </>
        ) : (
          UNSAID
        )}
      </Row>
      <Row label="Choke">
        {choke ? (
          <>
            {choke.turns === null ? "turns not said" : `${choke.turns} turns`}
            {choke.core && ` on ${choke.core}`}
            {choke.where && `, ${choke.where}`}
          </>
        ) : (
          UNSAID
        )}
      </Row>
      <Row label="Ground">{ground || UNSAID}</Row>
      {remarks && <Row label="Remarks">{remarks}</Row>}
    </dl>
  );
}

function Row({ label, children }: { label: string; children: ReactNode }) {
  return (
    <div className="grid gap-x-4 border-b border-rule py-2 sm:grid-cols-[8rem_1fr]">
      <dt className="text-small soft pt-0.5">{label}</dt>
      <dd className="whitespace-pre-line max-w-[72ch]">{children}</dd>
    </div>
  );
}

function size(metres: number | null, unit: LengthUnit): ReactNode {
  return metres === null ? UNSAID : metres === 0 ? ON_GROUND : formatLength(metres, unit);
}

function materialOf({ material, insulated }: AntennaElement): ReactNode {
  const skin = insulated === null ? "" : insulated ? "insulated" : "bare";
  return [material, skin].filter(Boolean).join(", ") || UNSAID;
}

const UNSAID = <span className="soft font-sans">not said</span>;
const ON_GROUND = <span className="font-sans">on the ground</span>;
