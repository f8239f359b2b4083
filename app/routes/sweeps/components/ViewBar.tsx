import { Link } from "react-router";
import { type SweepView, searchWith } from "../sweeps.schema";

/** How the curve is drawn: plain links, so that each choice is an address. */
export function ViewBar({ view }: { view: SweepView }) {
  return (
    <div className="flex flex-wrap gap-x-4 gap-y-2">
      <Choice label="Curve">
        <Option
          to={searchWith(view, { quantity: "rl" })}
          current={view.quantity === "rl"}
          word="Return loss"
        />
        <Option to={searchWith(view, { quantity: "swr" })} current={view.quantity === "swr"} word="SWR" />
      </Choice>
      <Choice label="Frequency axis">
        <Option to={searchWith(view, { scale: "linear" })} current={view.scale === "linear"} word="Linear" />
        <Option to={searchWith(view, { scale: "log" })} current={view.scale === "log"} word="Logarithmic" />
      </Choice>
    </div>
  );
}

function Choice({ label, children }: { label: string; children: React.ReactNode }) {
  return (
    <nav aria-label={label} className="choice">
      {children}
    </nav>
  );
}

function Option({ to, current, word }: { to: string; current: boolean; word: string }) {
  return (
    <Link to={to || "?"} replace preventScrollReset aria-current={current ? "true" : undefined}>
      {word}
    </Link>
  );
}
