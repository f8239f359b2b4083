import { formatOhm } from "~/measurement/complex/format";
import { formatFrequency } from "~/measurement/units";
import type { ComplexData } from "../../complex-page.server";
import { MethodLink } from "./AtEachDip";

/** All zeros of the reactance in view: what is called resonance, told apart from the dips. */
export function Resonances({ data }: { data: ComplexData }) {
  return (
    <div className="grid gap-2">
      <h3 id="resonances">Zeros of the reactance</h3>
      <p className="soft max-w-[72ch] text-small">
        Lowest SWR and resonance are two different frequencies. Series: X rises through zero, the current is
        high; parallel: it falls, the voltage is high.{" "}
        <MethodLink id="resonance">How they are found</MethodLink>
      </p>
      {data.zeros.length === 0 ? (
        <p>The reactance does not pass through zero in this stretch. A wider sweep may show where it does.</p>
      ) : (
        <ul className="zero-list">
          {data.zeros.map(({ frequencyHz, frequencyHalfHz, kind, resistanceOhm }) => (
            <li key={frequencyHz}>
              <span className="number">{formatFrequency(frequencyHz, frequencyHalfHz)}</span>{" "}
              <span className="soft">
                {kind}, R {formatOhm(resistanceOhm)}
              </span>
            </li>
          ))}
        </ul>
      )}
      {data.moreZeros > 0 && <p className="soft">{data.moreZeros} more; zoom in to see them.</p>}
    </div>
  );
}
