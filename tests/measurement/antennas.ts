import {
  type Antenna,
  type AntennaElement,
  type ElementKind,
  NO_ANTENNA,
} from "../../app/measurement/antenna.ts";

/** An invented part with its kind for a key and a name. */
export function part(kind: ElementKind, lengthM: number, key: string = kind): AntennaElement {
  return {
    ...{ key, kind, name: key, lengthM, count: 1, heightM: null },
    ...{ diameterMm: null, material: "", insulated: null, where: "" },
  };
}

export function bareAntenna(...elements: AntennaElement[]): Antenna {
  return { ...NO_ANTENNA, elements };
}
