import { notFound } from "~/errors";

/** Every address that is none of ours; the root's error page is drawn. */
export function loader() {
  throw notFound();
}

export function action() {
  throw notFound();
}

export default function Missing() {
  return null;
}
