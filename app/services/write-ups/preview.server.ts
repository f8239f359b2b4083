import { LRUCache } from "lru-cache";
import type { ProjectAccess } from "~/auth/require.server";
import { type Article, renderArticle } from "../markdown.server.ts";
import { figuresIn, MOST_FIGURES } from "../markdown-article.ts";
import { NO_LINKS } from "../markdown-links.ts";
import { loadLinks } from "../note-links.server.ts";
import { expandWriteUp } from "./drafts.server.ts";
import { figureDrawer, PLATE_ADDRESS } from "./figure-html.ts";
import { loadFigures } from "./figures.server.ts";
import type { FrozenFigure } from "./frozen.ts";
import { plateStates } from "./published.server.ts";

/** How a draft will look, with figures drawn now; to its writers, or `outside`, as everybody reads it. Nothing is stored. */
export async function drawDraft(access: ProjectAccess, written: string, outside = false): Promise<Article> {
  const { project } = access;
  const body = await expandWriteUp(project.id, written);
  const figures = await figuresOfNow(access, figuresIn(body).slice(0, MOST_FIGURES));
  const [plates, { references }] = await Promise.all([
    plateStates(figures),
    loadLinks(project.id, [body], access),
  ]);
  const named = [...references].filter(([subject]) => !outside || subject.startsWith("plate:"));
  const places = new Map(named.map(([subject, { path }]) => [subject, { path, now: null }]));
  const draw = figureDrawer({
    figures,
    plates,
    plateSource: PLATE_ADDRESS,
    linkTo: ({ path, subject }) => (outside && !subject.startsWith("plate:") ? null : path),
  });
  return renderArticle(body, { ...NO_LINKS, references: places, filesStay: true }, draw);
}

/** While somebody writes, the same figures are asked for with every pause in typing. */
async function figuresOfNow({ project }: ProjectAccess, subjects: string[]): Promise<FrozenFigure[]> {
  const key = (subject: string) => `${project.id} ${subject}`;
  const missing = subjects.filter((subject) => !recent.has(key(subject)));
  for (const figure of await loadFigures(project, missing)) recent.set(key(figure.subject), figure);
  return subjects.flatMap((subject) => recent.get(key(subject)) ?? []);
}

const recent = new LRUCache<string, FrozenFigure>({ max: 200, ttl: 20_000 });
