import type { CSSProperties } from "react";
import type { Bandwidth } from "~/measurement/sweep";
import { formatFrequency, formatSwr, formatWidth, formatWidthLimits } from "~/measurement/units";
import { cardVerdict, type WidthBar, widthBar } from "./card-words";
import type { ChartBand, ChartDip } from "./chart-types";
import { pick } from "./DipMarks";
import { type CardPlace, chooseTelling, MOST_CLOSE_CARDS, placeCards } from "./hollow-layout";
import { across, Stretched } from "./place";
import type { Scene } from "./scene";
import type { SceneDip } from "./scene-dips";
import { formatNoteCount } from "./words";

export interface HollowCardsProps {
  scene: Scene;
  designBands: readonly ChartBand[];
  dipHref: (dip: ChartDip) => string;
  chosenDipId?: string | null;
  onPick?: (dipId: string) => void;
}

const LEADER_HEIGHT_PX = 44;

/** The dips that get a card in this scene: give them to the chart as its `leaders`. */
export function dipsWithCards(scene: Scene): ReadonlySet<string> {
  return new Set(chooseTelling(scene.dips.map(({ dip }) => dip)).told.map((dip) => dip.id));
}

/** One card per dip under its chart, joined to it by a leader; a plain list where the page is narrow. */
export function HollowCards({ scene, designBands, dipHref, chosenDipId, onPick }: HollowCardsProps) {
  if (scene.dips.length === 0) return null;
  const cards = dipsWithCards(scene);
  const told = scene.dips.filter((dip) => cards.has(dip.id)).sort((a, b) => a.fraction - b.fraction);
  const rest = scene.dips.filter((dip) => !cards.has(dip.id));
  const fractions = told.map((dip) => dip.fraction);
  const places = placeCards(fractions);
  const close = told.length <= MOST_CLOSE_CARDS ? placeCards(fractions, true) : null;
  const links = { dipHref, chosenDipId, onPick };
  return (
    <section className="chart-frame" aria-label="Dips">
      <div className={`hollows ${crowdOf(told.length)}`}>
        <Leaders dips={told} places={places} />
        {close && <Leaders dips={told} places={close} close />}
        <ul className="hollow-row">
          {told.map(({ id, dip }, index) => (
            <HollowCard
              key={id}
              dip={dip}
              style={{ ...placeStyle(places, index), ...(close && placeStyle(close, index, "close")) }}
              {...links}
              designBands={designBands}
            />
          ))}
        </ul>
        {rest.length > 0 && (
          <p className="hollow-rest">
            <span className="soft">{told.length > 0 ? "Also" : "Dips"}</span>
            {rest.map(({ id, dip, spoken }) => (
              <a
                key={id}
                href={dipHref(dip)}
                aria-label={spoken}
                aria-current={id === chosenDipId || undefined}
                onClick={onPick && ((event) => pick(event, id, onPick))}
              >
                <span className="number">{formatFrequency(dip.frequencyHz, dip.frequencyUncertaintyHz)}</span>
                <span className="soft">SWR {formatSwr(dip.minimumSwr)}</span>
              </a>
            ))}
          </p>
        )}
      </div>
    </section>
  );
}

/** How many cards there are, as far as it decides how narrow their plot may be: for the styles. */
export function crowdOf(cards: number): string {
  if (cards <= 3) return "cards-few";
  return cards <= MOST_CLOSE_CARDS ? "cards-four" : "cards-many";
}

function Leaders(props: { dips: readonly SceneDip[]; places: CardPlace[]; close?: boolean }) {
  const { dips, places, close = false } = props;
  return (
    <svg
      className={close ? "hollow-leaders hollow-leaders-close" : "hollow-leaders"}
      height={LEADER_HEIGHT_PX}
      aria-hidden="true"
    >
      <Stretched width={1000} height={LEADER_HEIGHT_PX} plotWidthPx={null}>
        {dips.map((dip, index) => (
          <path
            key={dip.id}
            d={leaderPath(dip.fraction, places[index].anchor)}
            className="hollow-leader"
            vectorEffect="non-scaling-stroke"
          />
        ))}
      </Stretched>
    </svg>
  );
}

interface HollowCardProps extends Omit<HollowCardsProps, "scene"> {
  dip: ChartDip;
  style: CSSProperties;
}

function HollowCard({ dip, style, designBands, dipHref, chosenDipId, onPick }: HollowCardProps) {
  const verdict = cardVerdict(dip, designBands);
  const { bandwidth } = dip;
  const limit = bandwidth ? `${Number(bandwidth.limitSwr.toFixed(2))}:1` : "";
  return (
    <li className={`hollow-card tone-edge-${verdict.tone}`} style={style}>
      <h3>
        <a
          href={dipHref(dip)}
          aria-current={dip.id === chosenDipId || undefined}
          onClick={onPick && ((event) => pick(event, dip.id, onPick))}
        >
          {formatFrequency(dip.frequencyHz, dip.frequencyUncertaintyHz)}
        </a>
      </h3>
      <p className="number soft hollow-swr">
        SWR {formatSwr(dip.minimumSwr, dip.minimumSwrLow, dip.minimumSwrHigh).replace("–", "\u2060–\u2060")}
      </p>
      <Bar bar={widthBar(dip, designBands)} />
      <p className="number soft">
        {bandwidth
          ? `${limit} over ${bandwidth.open ? "at least " : ""}${cardWidth(bandwidth)}`
          : "never under the limit"}
        {bandwidth?.shared && ", shared"}
      </p>
      <p className={`hollow-verdict tone-${verdict.tone}`}>{verdict.text}</p>
      <p className="hollow-note">
        {dip.latestNote && <span className="hollow-note-text">{dip.latestNote}</span>}{" "}
        <span className="soft">{formatNoteCount(dip.noteCount)}</span>
      </p>
    </li>
  );
}

/** With its limits where the bench's errors are known. */
function cardWidth({ widthHz, widthUncertaintyHz, widthLowHz, widthHighHz }: Bandwidth): string {
  return widthLowHz === null || widthHighHz === null
    ? formatWidth(widthHz, widthUncertaintyHz)
    : formatWidthLimits(widthHz, widthLowHz, widthHighHz).replace("–", "\u2060–\u2060");
}

function Bar({ bar }: { bar: WidthBar }) {
  return (
    <svg className="width-bar" height="10" aria-hidden="true">
      <rect x="0" y="4" width="100%" height="2" className="width-bar-track" />
      {bar.band && (
        <rect
          x={across(bar.band.from, null)}
          y="1"
          width={across(bar.band.width, null)}
          height="8"
          className="width-bar-band"
        />
      )}
      {bar.dip && (
        <rect
          x={across(bar.dip.from, null)}
          y="3"
          width={across(bar.dip.width, null)}
          height="4"
          className="width-bar-dip"
        />
      )}
      <rect x={across(bar.at, null)} y="0" width="2" height="10" className="width-bar-at" />
    </svg>
  );
}

function placeStyle(places: CardPlace[], index: number, kind: "wide" | "close" = "wide"): CSSProperties {
  const before = index === 0 ? 0 : places[index - 1].left + places[index - 1].width;
  return {
    [`--hollow-${kind}-gap`]: across(places[index].left - before, null),
    [`--hollow-${kind}-width`]: across(places[index].width, null),
  } as CSSProperties;
}

function leaderPath(fromFraction: number, toFraction: number): string {
  const [from, to] = [fromFraction * 1000, toFraction * 1000].map((x) => Math.round(x * 10) / 10);
  return from === to
    ? `M${from} 0V${LEADER_HEIGHT_PX}`
    : `M${from} 0V6C${from} 26 ${to} 18 ${to} 38V${LEADER_HEIGHT_PX}`;
}
