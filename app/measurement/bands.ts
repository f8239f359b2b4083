/**
 * Amateur allocations by ITU region, for labels only: national limits differ, and only they decide.
 *
 * Edges in Hz, inclusive. Source: REGION_SOURCES beside each table; figures seen only in part are marked so.
 */

export type ItuRegion = 1 | 2 | 3;

export interface Band {
  /** "20 m". */
  name: string;
  lowHz: number;
  highHz: number;
  /** Null: the union of the three regions, where no region was chosen. */
  region: ItuRegion | null;
  /** Where the edges differ within the region. */
  remark: string | null;
}

export interface BandSource {
  title: string;
  /** ISO date of the plan. */
  date: string;
  /** What of it was seen, and what is from memory. */
  seen: string;
}

/**
 * Bands of a region that touch `fromHz`..`toHz`, ascending. Region null: the union of all, labelled as
 * general.
 */
export function bandsOverlapping(region: ItuRegion | null, fromHz: number, toHz: number): Band[] {
  return tableOf(region).filter((band) => band.highHz >= fromHz && band.lowHz <= toHz);
}

/** The band that holds `hz`, edges inclusive; null where none does. */
export function bandAt(region: ItuRegion | null, hz: number): Band | null {
  return tableOf(region).find((band) => hz >= band.lowHz && hz <= band.highHz) ?? null;
}

/** The plan behind a region's table; for null the three of them. */
export function bandSources(region: ItuRegion | null): BandSource[] {
  return region === null ? [1, 2, 3].map((r) => REGION_SOURCES[r as ItuRegion]) : [REGION_SOURCES[region]];
}

function tableOf(region: ItuRegion | null): Band[] {
  return region === null ? GENERAL : BANDS.filter((band) => band.region === region);
}

/** name, then low and high edge in kHz for each region, null where there is no allocation; remark. */
type Row = [string, [number, number] | null, [number, number] | null, [number, number] | null, string?];

const SAME = (low: number, high: number): [[number, number], [number, number], [number, number]] => [
  [low, high],
  [low, high],
  [low, high],
];

const ROWS: Row[] = [
  ["160 m", [1810, 2000], [1800, 2000], [1800, 2000]],
  ["80 m", [3500, 3800], [3500, 4000], [3500, 3900]],
  ["60 m", ...SAME(5351.5, 5366.5)],
  ["40 m", [7000, 7200], [7000, 7300], [7000, 7200]],
  ["30 m", ...SAME(10_100, 10_150)],
  ["20 m", ...SAME(14_000, 14_350)],
  ["17 m", ...SAME(18_068, 18_168)],
  ["15 m", ...SAME(21_000, 21_450)],
  ["12 m", ...SAME(24_890, 24_990)],
  ["10 m", ...SAME(28_000, 29_700)],
  ["6 m", [50_000, 52_000], [50_000, 54_000], [50_000, 54_000], "Region 1: 50-54 MHz in many African states"],
  ["4 m", [70_000, 70_500], null, null, "by national permission only"],
  ["2 m", [144_000, 146_000], [144_000, 148_000], [144_000, 148_000]],
  ["70 cm", ...SAME(430_000, 440_000), "420-450 MHz in the USA; 440-450 MHz in parts of region 3"],
];

/**
 * Where the parts that were seen stood. Region 1: 160 m, 80 m, 60 m and the foot of 40 m docslib.org/doc/5353906, 17 m uba.be
 * (bandplanning between 18.068 and 18.168 MHz), 6 m dokumen.tips (bandplan 50-52 MHz, 2011), 4 m and 2 m hamradio.com.pl (Bandplan
 * UKF, 2004). Region 2: docslib.org/doc/13887483. Region 3: pdfslide.us, document R3-004. Newer plans of regions 2
 * (September 2020) and 3 (November 2024) were not seen; a public review of the latter says that it drops 7.2-7.3 and
 * 440-450 MHz, which this table never had.
 */
const REGION_SOURCES: Record<ItuRegion, BandSource> = {
  1: {
    title: "IARU Region 1 HF band plan; IARU Region 1 VHF Handbook 8.00 (November 2017) above 30 MHz",
    date: "2020-10-16",
    seen: "seen for 160, 80, 60, 17, 6, 4 and 2 m, the rest from memory",
  },
  2: {
    title: "IARU Region 2 MF/HF band plan",
    date: "2008-01-01",
    seen: "160 m and 80 m seen, the rest from memory",
  },
  3: {
    title: "IARU Region 3 band plan, document R3-004 rev. 3",
    date: "2019-09-01",
    seen: "seen for 40 m (7.2-7.3 MHz is not allocated), the rest from memory",
  },
};

const REGIONS: ItuRegion[] = [1, 2, 3];

const BANDS: Band[] = ROWS.flatMap(([name, ...rest]) =>
  REGIONS.flatMap((region) => {
    const edges = rest[region - 1] as [number, number] | null;
    const remark = (rest[3] as string | undefined) ?? null;
    return edges ? [{ name, lowHz: edges[0] * 1e3, highHz: edges[1] * 1e3, region, remark }] : [];
  }),
);

const GENERAL: Band[] = ROWS.map(([name]) => {
  const all = BANDS.filter((band) => band.name === name);
  return {
    name,
    lowHz: Math.min(...all.map((band) => band.lowHz)),
    highHz: Math.max(...all.map((band) => band.highHz)),
    region: null,
    remark: "general: the union of the three regions",
  };
});
