import { Form } from "react-router";
import { Button } from "~/components/ui/Button";
import { InputField } from "~/components/ui/Field";
import type { BenchPageData } from "../bench-page.server";
import { knownWords, spanWords } from "../words";
import { BenchNumbers } from "./BenchNumbers";
import { BenchStrips } from "./BenchStrips";

/** What the bench can do: where the wish is met, why not elsewhere, and what would make more of it known. */
export function Quality({ data }: { data: BenchPageData }) {
  const { quality, scene, numbers, wish } = data;
  return (
    <section aria-labelledby="quality" className="grid gap-4">
      <h2 id="quality">What it can do</h2>
      <p className={`bench-known ${quality.ranges.length > 0 ? "text-moss" : "text-clay"}`}>
        {knownWords(wish, quality.ranges)}
      </p>
      <p className="soft text-small">{CORRECTIONS[quality.correction]}</p>
      <WishForm data={data} />
      {scene && (
        <>
          <BenchStrips
            scene={scene}
            label={`Directivity, disagreement and loss of ${data.bench.name} over frequency`}
          />
          <BenchNumbers numbers={numbers} />
        </>
      )}
      <Sentences
        id="limits"
        title="What limits it"
        items={quality.limits}
        none={scene ? nothingLimits(numbers) : null}
      />
      <Sentences id="missing" title="What is not known" items={quality.missing} none={null} />
    </section>
  );
}

/** The references tell of their own stretch only, however short it is. */
function nothingLimits(numbers: BenchPageData["numbers"]): string {
  const [fromHz, toHz] = [numbers[0]?.frequencyHz, numbers[numbers.length - 1]?.frequencyHz];
  if (fromHz === undefined || toHz === undefined) return "Not known: its references say nothing yet.";
  return `Nothing from ${spanWords({ fromHz, toHz })}. Its references cover no more than that: beyond it nothing is known of the bench.`;
}

function WishForm({ data }: { data: BenchPageData }) {
  const { wish, version, versions } = data;
  return (
    <Form className="flex flex-wrap items-end gap-x-4 gap-y-3 no-print" preventScrollReset replace>
      {version.publicId !== versions[0].publicId && (
        <input type="hidden" name="version" value={version.publicId} />
      )}
      <InputField
        label="An SWR of"
        name="swr"
        inputMode="decimal"
        defaultValue={wish.swr}
        key={`swr-${wish.swr}`}
        className="w-24"
      />
      <InputField
        label="known to ±"
        name="tolerance"
        inputMode="decimal"
        defaultValue={wish.tolerance}
        key={`tolerance-${wish.tolerance}`}
        className="w-24"
      />
      <Button variant="quiet">Where?</Button>
    </Form>
  );
}

interface SentencesProps {
  id: string;
  title: string;
  items: { code: string; message: string }[];
  none: string | null;
}

function Sentences({ id, title, items, none }: SentencesProps) {
  if (items.length === 0 && none === null) return null;
  return (
    <section aria-labelledby={id} className="grid gap-2">
      <h3 id={id}>{title}</h3>
      {items.length === 0 ? (
        <p className="soft">{none}</p>
      ) : (
        <ul className="bench-sentences">
          {items.map(({ code, message }) => (
            <li key={`${code} ${message}`}>{message}</li>
          ))}
        </ul>
      )}
    </section>
  );
}

const CORRECTIONS = {
  none: "Without an open or a short there is no 0 dB line, and sweeps stay as they were measured.",
  scalar:
    "Sweeps are referred to its 0 dB line. Its references have no phase, so what is left of its errors becomes limits.",
  "three-term":
    "Sweeps with phase are corrected by open, short and load; those without are referred to its 0 dB line.",
} as const;
