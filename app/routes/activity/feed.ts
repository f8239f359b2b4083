import { drawFeed } from "~/services/feed.server";
import type { Route } from "./+types/feed";
import { answerFeed } from "./answer-feed.server";

/** The account as an Atom feed. */
export function loader(args: Route.LoaderArgs): Promise<Response> {
  return answerFeed(args, drawFeed);
}
