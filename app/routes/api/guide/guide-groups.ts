import type { Operation, PathItem } from "../openapi-parts.ts";
import { curlOf } from "./curl.ts";
import type { Example } from "./example.ts";
import answers from "./example-answers.json";
import { EXAMPLE_GROUPS, filledIn, keyOf } from "./examples.ts";

/** The guide's calls: what the OpenAPI document says of each, with its examples. Pure. */

export interface GuideCall {
  id: string;
  method: string;
  path: string;
  summary: string;
  /** What may follow the question mark. */
  query: { name: string; says: string }[];
  examples: {
    key: string;
    says: string;
    command: string;
    status: string;
    /** What is asked for again until the work is done. */
    again: Example["until"] | null;
    answer: string;
  }[];
}

export function guideGroups(
  paths: Record<string, PathItem>,
  base: string,
): { title: string; calls: GuideCall[] }[] {
  const kept = { ...sampleNames(), origin: base.replace(/\/api\/v1$/, "") };
  return EXAMPLE_GROUPS.map(({ title, examples }) => {
    const operations = [...new Set(examples.map(({ operation }) => operation))];
    const calls = operations.flatMap((id) => {
      const found = findOperation(paths, id);
      const own = examples.filter(({ operation }) => operation === id);
      return found ? [callOf(id, found, own, kept, base)] : [];
    });
    return { title, calls };
  });
}

function callOf(
  id: string,
  { method, path, operation }: NonNullable<ReturnType<typeof findOperation>>,
  examples: Example[],
  kept: Record<string, string>,
  base: string,
): GuideCall {
  const status = Object.keys(operation.responses).find((code) => code.startsWith("2")) ?? "200";
  return {
    id,
    method,
    // As under the address that the page begins with.
    path: path.replace(/^\/api\/v1/, ""),
    summary: operation.summary,
    query: queryOf(operation),
    examples: examples.map((example) => ({
      key: keyOf(example),
      says: example.says,
      command: curlOf(filledIn(example, kept), base, method),
      status,
      again: example.until ?? null,
      answer: answerText(answerOf(example)),
    })),
  };
}

/** Words stand for what is no JSON. */
function answerText(answer: unknown): string {
  return typeof answer === "string" ? answer : JSON.stringify(answer, null, 2);
}

function findOperation(paths: Record<string, PathItem>, id: string) {
  for (const [path, item] of Object.entries(paths)) {
    for (const [method, operation] of Object.entries(item)) {
      if (operation.operationId === id) return { path, method: method.toUpperCase(), operation };
    }
  }
  return undefined;
}

interface Parameter {
  name: string;
  in: string;
  schema?: { description?: string };
}

function queryOf({ parameters = [] }: Operation): GuideCall["query"] {
  return (parameters as Parameter[])
    .filter((parameter) => parameter.in === "query")
    .map(({ name, schema }) => ({
      name,
      says: name === "cursor" ? "`nextCursor` of the page before" : (schema?.description ?? ""),
    }));
}

/** The ids that the sample answers give to later examples. */
function sampleNames(): Record<string, string> {
  const kept: Record<string, string> = {};
  for (const example of EXAMPLE_GROUPS.flatMap((group) => group.examples)) {
    for (const [name, where] of Object.entries(example.keep ?? {})) {
      const found = where.split(".").reduce<unknown>(memberOf, answerOf(example));
      if (typeof found === "string") kept[name] = found;
    }
  }
  return kept;
}

function memberOf(value: unknown, key: string): unknown {
  return value !== null && typeof value === "object" ? (value as Record<string, unknown>)[key] : undefined;
}

function answerOf(example: Example): unknown {
  return (answers as Record<string, unknown>)[keyOf(example)];
}
