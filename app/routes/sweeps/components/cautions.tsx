import { Caution } from "~/components/ui/Caution";

interface CautionProps {
  /** Cautions this person has put away. */
  dismissed: string[];
}

/** Sources: ITU Radio Regulations No. 18.1 (licence); exposure limits as set by regulators, e.g. 47 CFR 1.1310. */
export function FirstSweepCaution({ dismissed }: CautionProps) {
  if (dismissed.includes("first-sweep")) return null;
  return (
    <Caution id="first-sweep">
      Keep masts and wires away from power lines, and take feedlines off before lightning. Never transmit into
      an analyser or a bridge, nor near people: exposure limits are set by local regulators. Work at height
      and on mains belongs to those qualified for it.
    </Caution>
  );
}

export function OutsideBandsCaution({ dismissed }: CautionProps) {
  if (dismissed.includes("outside-bands")) return null;
  return (
    <Caution id="outside-bands">
      A dip outside your bands is a finding, not a permission: transmit only where your licence and local
      rules allow.
    </Caution>
  );
}
