import type { Definition } from "./definition";
import { workExample } from "./example-values";
import { renderFormula } from "./formula.server";

/** A definition with its formulas drawn and its example reckoned with the values that the address gives. */
export function showDefinition(definition: Definition, search: URLSearchParams) {
  const { id, title, says, source, limits } = definition;
  const formulas = definition.formulas.map(renderFormula);
  return { id, title, says, source, limits, formulas, worked: workExample(definition, search) };
}
export type ShownDefinition = ReturnType<typeof showDefinition>;
