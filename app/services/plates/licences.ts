/** What others may do with a plate. Names as their publishers give them; ids are SPDX names where there is one. */
export const LICENCE_IDS = ["CC-BY-4.0", "CC-BY-SA-4.0", "CC0-1.0", "all-rights-reserved"] as const;
export type LicenceId = (typeof LICENCE_IDS)[number];

export interface Licence {
  id: LicenceId;
  name: string;
  /** Its text; null where there is none to link. */
  address: string | null;
}

/** The first is proposed where a project chose none. */
export const LICENCES: readonly Licence[] = [
  {
    id: "CC-BY-4.0",
    name: "Creative Commons Attribution 4.0 (CC BY 4.0)",
    address: "https://creativecommons.org/licenses/by/4.0/",
  },
  {
    id: "CC-BY-SA-4.0",
    name: "Creative Commons Attribution-ShareAlike 4.0 (CC BY-SA 4.0)",
    address: "https://creativecommons.org/licenses/by-sa/4.0/",
  },
  {
    id: "CC0-1.0",
    name: "No rights reserved (CC0 1.0)",
    address: "https://creativecommons.org/publicdomain/zero/1.0/",
  },
  { id: "all-rights-reserved", name: "All rights reserved", address: null },
];

/** The licence of that name; undefined for one that is not offered. */
export function licenceOf(id: LicenceId): Licence;
export function licenceOf(id: string): Licence | undefined;
export function licenceOf(id: string): Licence | undefined {
  return LICENCES.find((licence) => licence.id === id);
}
