import { buildOverlayScene } from "../../../charts/overlay-scene.ts";
import { buildSweepScene, type Scene } from "../../../charts/scene.ts";
import { traceStyle } from "../../../charts/trace-styles.ts";
import type { PlateFigure } from "../record.ts";
import { lettersOf, traceLetter } from "./key.ts";
import { DipMark, Foot, n, type Plot, Remarks, ValueMarks, Washes } from "./marks.tsx";
import { bandsOf, chartDipOf, drawnDips, numbersOf, pointsOf, viewOf } from "./values.ts";

/** One sweep as land with water in its hollows, or several lines over one another. */
export function Curves({ figure, plot }: { figure: PlateFigure; plot: Plot }) {
  return figure.traces.length === 1 ? (
    <Land figure={figure} plot={plot} />
  ) : (
    <Lines figure={figure} plot={plot} />
  );
}

function Land({ figure, plot }: { figure: PlateFigure; plot: Plot }) {
  const [trace] = figure.traces;
  const { palette } = plot;
  const dips = drawnDips(figure);
  const { limits } = trace;
  const scene = buildSweepScene({
    points: pointsOf(trace),
    limits:
      figure.show.limits && limits ? { low: numbersOf(limits.low), high: numbersOf(limits.high) } : undefined,
    measured: trace.measured ? numbersOf(trace.measured) : undefined,
    dips: dips.map(chartDipOf),
    bands: bandsOf(figure, false),
    designBands: bandsOf(figure, true),
    view: viewOf(figure),
    swrLimit: figure.swrLimit ?? 2,
    plotWidthPx: plot.widthPx,
    plotHeightPx: plot.heightPx,
  });
  const letters = lettersOf(figure);
  return (
    <g>
      <rect width={plot.widthPx} height={plot.heightPx} fill={palette.surface} />
      <Washes bands={scene.ribbon} plot={plot} />
      <path d={scene.land || "M0 0"} fill={palette.land} />
      <ValueMarks ticks={scene.valueTicks} plot={plot} skipY={scene.limit?.y ?? null} />
      {scene.limit && (
        <text
          x="-8"
          y={n(scene.limit.y + 4)}
          textAnchor="end"
          fontFamily={palette.monoFont}
          fontSize="12"
          fill={palette.moss}
        >
          {scene.limit.label}
        </text>
      )}
      {scene.limits && <path d={scene.limits} fill={palette.soft} opacity="0.25" />}
      <Waters scene={scene} plot={plot} />
      <g fill="none" strokeLinejoin="round" strokeLinecap="round">
        {scene.measured && (
          <path d={scene.measured} stroke={palette.edge} strokeWidth="1.25" strokeDasharray="5 2" />
        )}
        <path d={scene.line || "M0 0"} stroke={palette.ink} strokeWidth="1.6" />
        {scene.offScale && (
          <path d={scene.offScale} stroke={palette.clay} strokeWidth="1.6" strokeDasharray="3 4" />
        )}
      </g>
      {scene.dips.map((dip) => (
        <DipMark
          key={dip.id}
          x={dip.fraction * plot.widthPx}
          y={dip.y}
          letter={letters.get(dip.id) ?? ""}
          colour={dip.id === figure.focus || figure.focus === null ? palette.heather : palette.soft}
          plot={plot}
        />
      ))}
      <Foot frequency={scene.frequency} ribbon={scene.ribbon} plot={plot} />
      <Remarks remarks={scene.remarks} plot={plot} />
    </g>
  );
}

function Waters({ scene, plot: { widthPx, palette } }: { scene: Scene; plot: Plot }) {
  return scene.waters.map(({ key, path, y, from, to, lowOpen, highOpen }) => {
    const [left, right] = [n(from * widthPx), n(to * widthPx)];
    return (
      <g key={key}>
        {path && <path d={path} fill={palette.water} />}
        <g stroke={palette.moss} strokeWidth="1.5">
          <line x1={left} x2={right} y1={n(y)} y2={n(y)} strokeDasharray="4 3" />
          {!lowOpen && <line x1={left} x2={left} y1={n(y - 4)} y2={n(y + 4)} />}
          {!highOpen && <line x1={right} x2={right} y1={n(y - 4)} y2={n(y + 4)} />}
        </g>
      </g>
    );
  });
}

function Lines({ figure, plot }: { figure: PlateFigure; plot: Plot }) {
  const { palette, widthPx } = plot;
  const dips = drawnDips(figure);
  const groups = figure.trails.map(({ id, stops }) => ({
    id,
    stops: stops.flatMap((stop) => dips.find((dip) => dip.id === stop.dip) ?? []),
  }));
  const alone = dips.filter((dip) => !groups.some(({ stops }) => stops.includes(dip)));
  const links = [...groups, ...alone.map((dip) => ({ id: dip.id, stops: [dip] }))].map(({ id, stops }) => ({
    id,
    stops: stops.map(({ trace, frequencyHz, returnLossDb }) => ({
      traceId: trace,
      frequencyHz,
      returnLossDb,
    })),
    letter: stops.map((dip) => lettersOf(figure).get(dip.id) ?? "")[0] ?? "",
  }));
  const scene = buildOverlayScene({
    traces: figure.traces.map((trace) => ({ id: trace.id, label: trace.label, points: pointsOf(trace) })),
    links,
    bands: bandsOf(figure, false),
    designBands: bandsOf(figure, true),
    view: viewOf(figure),
    plotWidthPx: widthPx,
    plotHeightPx: plot.heightPx,
  });
  return (
    <g>
      <rect width={widthPx} height={plot.heightPx} fill={palette.surface} />
      <Washes bands={scene.ribbon} plot={plot} />
      <ValueMarks ticks={scene.valueTicks} plot={plot} />
      {scene.traces.map(({ id, line, style, end }) => {
        const { colour, dash } = traceStyle(style, palette);
        return (
          <g key={id}>
            <path
              d={line || "M0 0"}
              fill="none"
              stroke={colour}
              strokeWidth="1.8"
              strokeDasharray={dash}
              strokeLinejoin="round"
            />
            {end && (
              <text
                x={n(end.fraction * widthPx + 6)}
                y={n(end.y + 4)}
                fontFamily={palette.sansFont}
                fontSize="13"
                fontWeight="700"
                fill={colour}
              >
                {traceLetter(style)}
              </text>
            )}
          </g>
        );
      })}
      {scene.links.map(({ id, stops }, i) => (
        <g key={id}>
          {stops.length > 1 && (
            <path
              d={`M${stops.map(({ fraction, y }) => `${n(fraction * widthPx)} ${n(y)}`).join("L")}`}
              fill="none"
              stroke={palette.heather}
              strokeWidth="1.25"
            />
          )}
          {stops.map((stop, j) => (
            <DipMark
              key={stop.style}
              x={stop.fraction * widthPx}
              y={stop.y}
              letter={j === 0 ? links[i].letter : ""}
              colour={traceStyle(stop.style, palette).colour}
              letterColour={palette.heather}
              plot={plot}
            />
          ))}
        </g>
      ))}
      <Foot frequency={scene.frequency} ribbon={scene.ribbon} plot={plot} />
      <Remarks remarks={scene.remarks} plot={plot} />
    </g>
  );
}
