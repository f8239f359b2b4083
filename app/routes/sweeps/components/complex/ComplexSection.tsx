import { useMemo } from "react";
import { Link, useNavigate } from "react-router";
import { frequencyScale } from "~/charts/axis";
import type { ChartDip } from "~/charts/chart-types";
import { ImpedanceChart } from "~/charts/ImpedanceChart";
import { LiveSmithChart } from "~/charts/LiveSmithChart";
import { PhaseChart } from "~/charts/PhaseChart";
import { unpackComplex } from "~/charts/sent-complex";
import { gammaToImpedance } from "~/measurement/reflection";
import type { ShownDip } from "~/services/shown-dips.server";
import type { ComplexData } from "../../complex-page.server";
import { type SweepView, searchWith } from "../../sweeps.schema";
import { AtEachDip } from "./AtEachDip";
import { ComplexTable } from "./ComplexTable";
import { MatchPart } from "./MatchPart";
import { Resonances } from "./Resonances";

interface ComplexSectionProps {
  /** Null for a scalar sweep: then there is nothing to show. */
  data: ComplexData | null;
  dips: readonly ShownDip[];
  view: SweepView;
  swrLimit: number;
}

/** What only a sweep with phase can tell: the plane of Γ, impedance, resonances, the side of the reference, matching elements. */
export function ComplexSection({ data, ...rest }: ComplexSectionProps) {
  return data && <Shown data={data} {...rest} />;
}

function Shown({ data, dips, view, swrLimit }: ComplexSectionProps & { data: ComplexData }) {
  const navigate = useNavigate();
  const points = useMemo(() => unpackComplex(data.points), [data.points]);
  const { resistanceOhm, reactanceOhm } = useMemo(() => columns(points, data.referenceOhm), [points, data]);
  const { fromHz, toHz } = data.range;
  const scale = useMemo(() => frequencyScale(view.scale, fromHz, toHz), [view.scale, fromHz, toHz]);
  const marked = useMemo(() => markedDips(data, dips), [data, dips]);
  const marksHz = useMemo(() => marked.map(({ dip }) => dip.frequencyHz), [marked]);
  const { frequencyHz, phaseDeg } = points;
  return (
    <section aria-labelledby="impedance" className="grid gap-4">
      <div className="grid gap-1">
        <h2 id="impedance">Impedance</h2>
        <p className="soft max-w-[72ch] text-small">
          {data.plane === "antenna"
            ? "At the antenna's end of the feedline. "
            : "As seen at the port: a length of feedline turns and shrinks the line, so R, X and Q are those of antenna and line together. "}
          <Link to="/methods#impedance">How it is reckoned</Link>
        </p>
      </div>
      <div className="complex-charts">
        <LiveSmithChart
          points={points}
          dips={marked}
          referenceOhm={data.referenceOhm}
          swrLimit={swrLimit}
          label="Reflection coefficient with its angle, on circles of even resistance and reactance"
          dipHref={(dip) => searchWith(view, { dip: dip.id })}
          chosenDipId={view.dip}
          onPick={(id) =>
            navigate(searchWith(view, { dip: id }), { replace: true, preventScrollReset: true })
          }
        />
        <div className="grid content-start gap-4 min-w-0">
          <ImpedanceChart
            {...{ frequencyHz, resistanceOhm, reactanceOhm, scale, marksHz }}
            referenceOhm={data.referenceOhm}
            label="Resistance and reactance over frequency; the numbers stand in the table below"
          />
          <PhaseChart
            {...{ frequencyHz, phaseDeg, scale, marksHz }}
            label="Angle of the reflection coefficient over frequency; the numbers stand in the table below"
          />
        </div>
      </div>
      <AtEachDip data={data} />
      <Resonances data={data} />
      <MatchPart data={data} />
      <ComplexTable
        {...{ frequencyHz, resistanceOhm, reactanceOhm, phaseDeg }}
        re={points.re}
        im={points.im}
      />
    </section>
  );
}

function columns({ re, im }: { re: ArrayLike<number>; im: ArrayLike<number> }, referenceOhm: number) {
  const resistanceOhm = new Float64Array(re.length);
  const reactanceOhm = new Float64Array(re.length);
  for (let i = 0; i < re.length; i++) {
    const z = gammaToImpedance({ re: re[i], im: im[i] }, referenceOhm);
    [resistanceOhm[i], reactanceOhm[i]] = [z.re, z.im];
  }
  return { resistanceOhm, reactanceOhm };
}

/** The dips that have a place on the plane, with their threads. */
function markedDips(data: ComplexData, dips: readonly ShownDip[]) {
  return data.dips.flatMap(({ frequencyHz, gamma }) => {
    const dip = dips.find((one) => one.frequencyHz === frequencyHz);
    if (!gamma || !dip) return [];
    const shown: ChartDip = { ...dip, id: dip.publicId ?? `tried-${frequencyHz}` };
    return [{ dip: shown, gamma }];
  });
}
