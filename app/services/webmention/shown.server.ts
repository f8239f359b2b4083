import * as webmentions from "~/db/webmentions.server";

export interface ShownMention {
  source: string;
  /** As the page calls itself, else its host. */
  title: string;
  host: string;
  at: Date;
}

/** The pages elsewhere that cite a plate or a write-up and that an owner shows. Row ids. */
export async function shownMentions(
  of: { plateId: number } | { writeUpId: number },
): Promise<ShownMention[]> {
  const rows = await webmentions.findShown(of);
  return rows.map(({ source, title, at }) => {
    const { host } = new URL(source);
    return { source, title: title || host, host, at };
  });
}
