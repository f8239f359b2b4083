import { Form, useLocation } from "react-router";
import { Button } from "~/components/ui/Button";
import { InputField } from "~/components/ui/Field";
import { formatImpedance } from "~/measurement/complex/format";
import { gammaToSwr } from "~/measurement/reflection";
import { formatFrequency, formatSwr } from "~/measurement/units";
import type { ComplexData } from "../../complex-page.server";
import { MethodLink } from "./AtEachDip";
import { NetworkCard } from "./NetworkCard";

type Match = ComplexData["match"];

/** The elements that would match the antenna at one frequency, chosen in the address. */
export function MatchPart({ data }: { data: ComplexData }) {
  const { match, referenceOhm } = data;
  const swr = match.gamma && gammaToSwr(Math.hypot(match.gamma.re, match.gamma.im));
  return (
    <div className="grid gap-3" id="match">
      <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-3">
        <h3 id="matching">Matching to {referenceOhm} Ω</h3>
        <MatchForm match={match} />
      </div>
      {match.load && swr !== null ? (
        <>
          <p>
            At <span className="number">{formatFrequency(match.hz)}</span> the port sees{" "}
            <span className="number">{formatImpedance(match.load)}</span>, SWR{" "}
            <span className="number">{formatSwr(swr)}</span>.{" "}
            <MethodLink id="l-network">How the elements are reckoned</MethodLink>
          </p>
          <Solutions data={data} />
        </>
      ) : (
        <p className="soft">
          There is a gap in the sweep at {formatFrequency(match.hz)}: nothing can be said there.
        </p>
      )}
    </div>
  );
}

function MatchForm({ match }: { match: Match }) {
  const { pathname, search } = useLocation();
  const others = [...new URLSearchParams(search)].filter(([name]) => name !== "match");
  return (
    <Form action={`${pathname}#match`} preventScrollReset replace className="flex flex-wrap items-end gap-3">
      {others.map(([name, value]) => (
        <input key={`${name} ${value}`} type="hidden" name={name} value={value} />
      ))}
      <InputField
        key={match.hz}
        label="Match at"
        name="match"
        defaultValue={plainFrequency(match.hz)}
        inputMode="text"
        autoComplete="off"
        className="w-44"
        errors={problemWords(match)}
      />
      <Button variant="quiet">Show elements</Button>
    </Form>
  );
}

function Solutions({ data: { match, referenceOhm } }: { data: ComplexData }) {
  const { singles, networks, load } = match;
  if (load && !(load.re > 0)) {
    return (
      <p>
        The resistance there is not positive: more comes back than was sent, by noise or calibration. No
        passive network matches that.
      </p>
    );
  }
  if (singles.length === 0 && networks.length === 0)
    return <p>It is matched as it is: no element is needed.</p>;
  return (
    <>
      <div className="network-cards">
        {singles.map(({ element, swr }) => (
          <NetworkCard
            key={element.place}
            title={element.place === "series" ? "One element in series" : "One element across the port"}
            elements={[element]}
            result={`SWR ${formatSwr(swr)} there`}
          />
        ))}
        {networks
          .filter(({ elements }) => elements.length === 2)
          .map(({ order, elements, input }) => (
            <NetworkCard
              key={`${order} ${elements[0].kind} ${elements[1].kind} ${elements[0].value}`}
              title={
                order === "series-first" ? "Series at the port, then across" : "Across the port, then series"
              }
              elements={elements}
              result={`${formatImpedance(input)} there`}
            />
          ))}
      </div>
      <p className="soft max-w-[72ch] text-small">
        Each network is drawn from the port (left) to the antenna (right) and was checked by reckoning back
        what the port sees; {referenceOhm} Ω is the aim. The elements are ideal: real coils have loss, and the
        match holds near this frequency only. Under power their voltages and currents are high: use parts
        rated for it, in a box, and never touch or tune them while transmitting.
      </p>
    </>
  );
}

function problemWords({ problem, startHz, stopHz, hz }: Match): string[] | undefined {
  const instead = `Shown is ${formatFrequency(hz)}.`;
  if (problem === null) return undefined;
  if (problem === "not-a-frequency") return [`That is no frequency: write 14.15 MHz. ${instead}`];
  return [`The sweep goes from ${formatFrequency(startHz)} to ${formatFrequency(stopHz)}. ${instead}`];
}

/** With an ordinary space, as a person would type it. */
function plainFrequency(hz: number): string {
  return formatFrequency(hz).replace("\u2009", " ");
}
