import { Caution } from "~/components/ui/Caution";

/** Whoever reads lengths and heights is about to go out and change them. Sources as of the first sweep's caution. */
export function AntennaCautions({ dismissed }: { dismissed: string[] }) {
  if (dismissed.includes("antenna-work")) return null;
  return (
    <Caution id="antenna-work">
      Before work on an antenna: keep masts and wires away from power lines, by more than their own length;
      take it down and the feedline off before lightning; no transmitter on while somebody is near or touches
      it. Work at height and on mains belongs to those qualified for it.
    </Caution>
  );
}
