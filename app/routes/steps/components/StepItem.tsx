import { Link } from "react-router";
import { DateTime } from "~/components/ui/DateTime";
import type { ListedStepData } from "../step-list.server";

/** A step in the list: what, when, how much, and between which sweeps. */
export function StepItem({ step, base }: { step: ListedStepData; base: string }) {
  const sweeps = base.replace(/steps$/, "sweeps");
  return (
    <li
      className={`border-l-3 pl-3 grid gap-1 ${step.state === "planned" ? "border-heather" : "border-rule"}`}
    >
      <p className="flex flex-wrap items-baseline gap-x-3">
        <Link to={`${base}/${step.publicId}`} className="font-semibold">
          {step.title}
        </Link>
        <span className="text-small soft">
          {step.at ? <DateTime at={step.at} dateOnly /> : "no day yet"}
          {" · "}
          {step.by ?? "former member"}
        </span>
      </p>
      {step.quantities.length > 0 && (
        <ul className="text-small number">
          {step.quantities.map((line) => (
            <li key={line}>{line}</li>
          ))}
        </ul>
      )}
      {step.state === "done" && (
        <p className="text-small soft">
          {step.before ? (
            <Link to={`${sweeps}/${step.before.publicId}`}>{step.before.title}</Link>
          ) : (
            "no sweep before"
          )}
          {" → "}
          {step.after ? (
            <Link to={`${sweeps}/${step.after.publicId}`}>{step.after.title}</Link>
          ) : (
            "no sweep after it yet"
          )}
        </p>
      )}
      {step.sharedWith.length > 0 && (
        <p className="text-small text-clay">
          Between the same sweeps: {step.sharedWith.map(({ title }) => `“${title}”`).join(", ")}. Their
          effects can't be told apart.
        </p>
      )}
    </li>
  );
}
