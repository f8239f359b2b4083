import { KINDS, type KindName } from "~/db/bundle-kinds.server";
import { findTaken } from "~/db/bundle-rows.server";
import type { Queryable } from "~/db/client.server";
import { newPublicId } from "~/db/ids.server";
import type { BundleIds } from "./read-records.server.ts";

/** Public ids of a bundle → those they have here. What is free here is kept; what is taken gets a new one, wherever it is named. */
export interface NewIds {
  of: (kind: KindName, id: string) => string;
  /** All that changed, whatever their kind; persons too. */
  changed: Map<string, string>;
}

export async function newIdsOf(ids: BundleIds, people: Map<string, string>, tx: Queryable): Promise<NewIds> {
  const changed = new Map(people);
  const byKind = new Map<KindName, Map<string, string>>();
  for (const kind of KINDS) {
    const own = new Map<string, string>();
    const wanted = [...(ids.get(kind.name) ?? [])];
    const taken = wanted.length > 0 ? await findTaken(kind, wanted, tx) : [];
    for (const id of taken) {
      const fresh = newPublicId();
      own.set(id, fresh);
      changed.set(id, fresh);
    }
    byKind.set(kind.name, own);
  }
  return { of: (kind, id) => byKind.get(kind)?.get(id) ?? id, changed };
}

/** A text in which what is named as `dip:…`, or by an address of this site's own, is named by its new id. */
export function rewriteText(text: string, changed: Map<string, string>): string {
  if (changed.size === 0) return text;
  const swap = (part: string) => part.replace(/[0-9a-z]{1,16}/g, (word) => changed.get(word) ?? word);
  return text
    .replace(NAMED, (_, kind: string, list: string) => `${kind}:${swap(list)}`)
    .replace(OWN_ADDRESS, (_, head: string, address: string) => head + swap(address));
}

/** The same for what is inside JSON: a text that is exactly an id. */
export function rewriteJson(value: unknown, changed: Map<string, string>): unknown {
  if (changed.size === 0) return value;
  if (typeof value === "string") return changed.get(value) ?? value;
  if (Array.isArray(value)) return value.map((item) => rewriteJson(item, changed));
  if (value === null || typeof value !== "object" || value instanceof Date) return value;
  return Object.fromEntries(Object.entries(value).map(([key, item]) => [key, rewriteJson(item, changed)]));
}

const NAMED =
  /\b(person|dip|sweep|step|plate|attachment|trail|bench|compare|note):([0-9a-z]{1,16}(?:,[0-9a-z]{1,16})*)/g;
const OWN_ADDRESS = /(\]\()(\/(?:projects|plates|write-ups)\/[^)\s]*)/g;
