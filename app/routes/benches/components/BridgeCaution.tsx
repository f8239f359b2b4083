import { Caution } from "~/components/ui/Caution";

/** Stands where somebody is about to sweep a bench (common practice, no source: bridges and loads are rated for milliwatts). */
export function BridgeCaution() {
  return (
    <Caution id="bridge" dismissible={false}>
      Sweep with a generator’s milliwatts only: never transmit into a bridge, an analyser or a reference load.
    </Caution>
  );
}
