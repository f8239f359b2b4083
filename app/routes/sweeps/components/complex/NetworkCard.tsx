import type { Element } from "~/measurement/complex/element";
import { formatElement } from "~/measurement/complex/format";

interface NetworkCardProps {
  title: string;
  /** From the port to the load. */
  elements: readonly Element[];
  result: string;
}

/** A matching network: its drawing, its values, and what the port then sees. */
export function NetworkCard({ title, elements, result }: NetworkCardProps) {
  return (
    <div className="panel network-card">
      <h4>{title}</h4>
      <NetworkDrawing elements={elements} />
      <ul>
        {elements.map((element) => (
          <li key={element.place}>
            {element.place === "series" ? "in series" : "across"}{" "}
            <span className="number">{formatElement(element)}</span>
          </li>
        ))}
      </ul>
      <p className="soft text-small">{result}</p>
    </div>
  );
}

const WIDTH = 200;
const TOP = 22;
const FOOT = 76;

function NetworkDrawing({ elements }: { elements: readonly Element[] }) {
  const places = elements.length === 1 ? [100] : [70, 130];
  const series = elements.findIndex(({ place }) => place === "series");
  const shunt = elements.findIndex(({ place }) => place === "shunt");
  const gap = series < 0 ? null : places[series];
  return (
    <svg viewBox={`0 0 ${WIDTH} 92`} className="network-drawing" aria-hidden="true">
      <g fill="none" stroke="var(--color-ink)" strokeWidth="1.6" strokeLinecap="round" strokeLinejoin="round">
        <path d={gap === null ? `M18 ${TOP}H176` : `M18 ${TOP}H${gap - 16}M${gap + 16} ${TOP}H176`} />
        <path d={`M18 ${FOOT}H176`} />
        {gap !== null && (
          <g transform={`translate(${gap} ${TOP})`}>
            <PartSymbol kind={elements[series].kind} />
          </g>
        )}
        {shunt >= 0 && (
          <>
            <path d={`M${places[shunt]} ${TOP}V33M${places[shunt]} 65V${FOOT}`} />
            <g transform={`translate(${places[shunt]} 49) rotate(90)`}>
              <PartSymbol kind={elements[shunt].kind} />
            </g>
          </>
        )}
        <path d={`M176 ${TOP}V36M176 62V${FOOT}`} />
        <rect x="170" y="36" width="12" height="26" fill="var(--color-land)" />
      </g>
      <g fill="var(--color-surface)" stroke="var(--color-ink)" strokeWidth="1.6">
        <circle cx="14" cy={TOP} r="3.5" />
        <circle cx="14" cy={FOOT} r="3.5" />
      </g>
    </svg>
  );
}

/** 32 units long about its middle. */
function PartSymbol({ kind }: Pick<Element, "kind">) {
  return kind === "inductor" ? (
    <path d="M-16 0h2a4.7 4.7 0 0 1 9.3 0a4.7 4.7 0 0 1 9.4 0a4.7 4.7 0 0 1 9.3 0h2" />
  ) : (
    <path d="M-16 0H-3M3 0H16M-3 -9V9M3 -9V9" />
  );
}
