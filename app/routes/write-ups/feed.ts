import { answerFeed } from "~/routes/activity/answer-feed.server";
import { drawWriteUpFeed } from "~/services/write-ups/feed.server";
import type { Route } from "./+types/feed";

/** What is published, as an Atom feed. */
export function loader(args: Route.LoaderArgs): Promise<Response> {
  return answerFeed(args, drawWriteUpFeed);
}
