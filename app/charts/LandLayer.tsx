import type { Palette } from "./palette";
import { across, Stretched } from "./place";
import type { Scene, Water } from "./scene";

export interface LandLayerProps {
  scene: Scene;
  palette: Palette;
  id: string;
  lineHidden: boolean;
}

/** The land with its strata, the design bands' washes, the water in the hollows and the pen line on top. */
export function LandLayer({ scene, palette, id, lineHidden }: LandLayerProps) {
  const { plotHeightPx: height, plotWidthPx, pathWidth } = scene;
  const clipId = `${id}-land`;
  const top = scene.valueTicks[0]?.y ?? 0;
  return (
    <g>
      <Washes scene={scene} palette={palette} opacity={1} />
      <line x1="0" x2={across(1, plotWidthPx)} y1={top} y2={top} stroke={palette.rule} />
      <Stretched width={pathWidth} height={height} plotWidthPx={plotWidthPx}>
        <defs>
          <path id={`${clipId}-shape`} d={scene.land || "M0 0"} />
        </defs>
        <clipPath id={clipId}>
          <use href={`#${clipId}-shape`} />
        </clipPath>
        <use href={`#${clipId}-shape`} fill={palette.land} />
      </Stretched>
      <Washes scene={scene} palette={palette} opacity={0.35} />
      <Stretched width={pathWidth} height={height} plotWidthPx={plotWidthPx}>
        <g clipPath={`url(#${clipId})`}>
          {scene.valueTicks.slice(1).map((tick) => (
            <path
              key={tick.label}
              d={`M0 ${tick.y}H${pathWidth}`}
              stroke={palette.edge}
              strokeDasharray="1 4"
              opacity="0.7"
              vectorEffect="non-scaling-stroke"
            />
          ))}
        </g>
        {scene.limits && <path d={scene.limits} fill={palette.soft} opacity="0.25" />}
        {scene.waters.map((water) => (
          <path key={water.key} d={water.path} fill={palette.water} />
        ))}
        {scene.measured && (
          <path
            d={scene.measured}
            fill="none"
            stroke={palette.edge}
            strokeWidth="1.25"
            strokeDasharray="5 2"
            strokeLinejoin="round"
            vectorEffect="non-scaling-stroke"
          />
        )}
        <PenLines {...{ scene, palette, lineHidden }} />
      </Stretched>
      {scene.waters.map((water) => (
        <WaterLevel key={water.key} water={water} plotWidthPx={plotWidthPx} palette={palette} />
      ))}
      {scene.empty && (
        <text
          x={across(0.5, plotWidthPx)}
          y={height / 2}
          textAnchor="middle"
          fontFamily={palette.sansFont}
          fill={palette.soft}
        >
          No numbers in this stretch
        </text>
      )}
      {scene.remarks.map((remark, index) => (
        <text
          key={remark}
          x="6"
          y={14 + index * 14}
          fontFamily={palette.sansFont}
          fontSize="12"
          fill={palette.clay}
          stroke={palette.land}
          strokeWidth="4"
          paintOrder="stroke"
        >
          {remark}
        </text>
      ))}
    </g>
  );
}

function PenLines({ scene, palette, lineHidden }: Omit<LandLayerProps, "id">) {
  const pen = {
    fill: "none",
    strokeWidth: 1.6,
    strokeLinejoin: "round",
    strokeLinecap: "round",
    vectorEffect: "non-scaling-stroke",
  } as const;
  return (
    <>
      {!lineHidden && <path d={scene.line} stroke={palette.ink} {...pen} />}
      {scene.offScale && <path d={scene.offScale} stroke={palette.clay} strokeDasharray="3 4" {...pen} />}
    </>
  );
}

function Washes({ scene, palette, opacity }: { scene: Scene; palette: Palette; opacity: number }) {
  return scene.ribbon
    .filter((band) => band.design)
    .map((band) => (
      <rect
        key={`${band.name} ${band.fraction}`}
        x={across(band.fraction, scene.plotWidthPx)}
        y="0"
        width={across(Math.max(band.widthFraction, 0.001), scene.plotWidthPx)}
        height={scene.plotHeightPx}
        fill={palette.wash}
        opacity={opacity}
      />
    ));
}

/** The dashes at the limit across a hollow, with a stop at each edge that was found. */
function WaterLevel({
  water,
  plotWidthPx,
  palette,
}: {
  water: Water;
  plotWidthPx: number | null;
  palette: Palette;
}) {
  const [from, to] = [across(water.from, plotWidthPx), across(water.to, plotWidthPx)];
  const { y } = water;
  return (
    <g stroke={palette.moss} strokeWidth="1.5">
      <line x1={from} x2={to} y1={y} y2={y} strokeDasharray="4 3" />
      {!water.lowOpen && <line x1={from} x2={from} y1={y - 4} y2={y + 4} />}
      {!water.highOpen && <line x1={to} x2={to} y1={y - 4} y2={y + 4} />}
    </g>
  );
}
