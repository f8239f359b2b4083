import { useSyncExternalStore } from "react";

/** False while drawn on the server and on the first client pass, true once scripts run. */
export function useHydrated(): boolean {
  return useSyncExternalStore(
    () => () => undefined,
    () => true,
    () => false,
  );
}
