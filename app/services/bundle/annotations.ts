import type { Rec } from "./records.ts";

/**
 * A note as a W3C Web Annotation. Its target is a record of the bundle by its path; a stretch of frequency is a fragment
 * `hz=FROM,TO` of our own, a region of a picture one of Media Fragments URI 1.0 (`xywh=percent:…`).
 * Source: W3C Recommendation, Web Annotation Data Model, 2017 (from memory, not seen).
 */
export function annotationOf(note: Rec, author: string | null): object {
  const removed = note.removedAt !== null;
  return {
    "@context": "http://www.w3.org/ns/anno.jsonld",
    id: `urn:swale:note:${note.id}`,
    type: "Annotation",
    motivation: note.parent ? "replying" : "commenting",
    created: note.createdAt,
    ...(note.editedAt ? { modified: note.editedAt } : {}),
    ...(author ? { creator: { type: "Person", name: author } } : {}),
    ...(removed
      ? {}
      : { body: { type: "TextualBody", value: note.body, format: "text/markdown", purpose: "commenting" } }),
    target: targetOf(note),
  };
}

function targetOf(note: Rec): object | string {
  if (note.parent) return `urn:swale:note:${note.parent}`;
  for (const kind of ["dip", "trail", "step", "bench", "sweep"] as const) {
    if (!note[kind]) continue;
    const source = `urn:swale:${kind}:${note[kind]}`;
    const selector = selectorOf(note);
    return selector ? { type: "SpecificResource", source, selector } : source;
  }
  return "urn:swale:project";
}

function selectorOf(note: Rec): object | null {
  if (note.fromHz !== null && note.toHz !== null) {
    return { type: "FragmentSelector", value: `hz=${note.fromHz},${note.toHz}` };
  }
  const region = note.region as { x: number; y: number; width: number; height: number } | null;
  if (!region) return null;
  const percent = [region.x, region.y, region.width, region.height].map((share) => share * 100);
  return {
    type: "FragmentSelector",
    conformsTo: "http://www.w3.org/TR/media-frags/",
    value: `xywh=percent:${percent.join(",")}`,
  };
}
