import { describe, expect, it } from "vitest";
import { columnsOf, fieldOf, KIND_NAMES, KINDS } from "~/db/bundle-kinds.server";
import { schemaText } from "~/services/bundle/readme";
import { PATH_FIELDS, RECORDS } from "~/services/bundle/records";

describe("the shapes of records", () => {
  it("stand in the order of the kinds, one each", () => {
    expect(KINDS.map(({ name }) => name)).toEqual([...KIND_NAMES]);
    expect(Object.keys(RECORDS).sort()).toEqual([...KIND_NAMES].sort());
  });

  it.each(KINDS)("of $name have every column of the table: a new one is not forgotten", (kind) => {
    const fields = columnsOf(kind).map(([column]) => fieldOf(kind, column));
    // What bytes are referred to stands in the bytes; here it is said beside their path.
    const beside = new Set<string>([...PATH_FIELDS, ...(kind.name === "readings" ? ["referenceOhm"] : [])]);
    const shape = Object.keys(RECORDS[kind.name].shape).filter((field) => !beside.has(field));
    expect(shape.sort()).toEqual(fields.sort());
  });

  it.each(KINDS)("of $name name only kinds that come before, or are written later", (kind) => {
    const at = KIND_NAMES.indexOf(kind.name);
    const ahead = Object.entries(kind.refs).filter(
      ([column, names]) =>
        names !== "people" && KIND_NAMES.indexOf(names) > at && !kind.later.includes(column),
    );
    expect(ahead).toEqual([]);
  });

  it.each([...KIND_NAMES, "people" as const])("of %s go out as JSON Schema", (kind) => {
    expect(JSON.parse(schemaText(kind))).toMatchObject({ type: "object", additionalProperties: false });
  });
});
