import { unavailable } from "~/errors";
import { log } from "~/services/log.server";
import { getObject, getObjectStream } from "~/services/storage.server";

/** The original's bytes; where the store of originals does not answer, a page that says so. */
export function readOriginal(storageKey: string): Promise<Uint8Array> {
  return getObject(storageKey).catch(storeIsSilent);
}

export function streamOriginal(storageKey: string) {
  return getObjectStream(storageKey).catch(storeIsSilent);
}

function storeIsSilent(error: unknown): never {
  log.error({ err: error }, "an original could not be fetched from the store");
  throw unavailable(
    "The original can't be fetched just now",
    "The store of original files does not answer. The file is safe there, and what was read from it is shown on the sweep's page. Try again in a minute.",
  );
}
