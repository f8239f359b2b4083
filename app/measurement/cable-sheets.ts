import type { CablePoint, CableSheet } from "./cable-entry.ts";

/** "30: 0.7 50: 0.9": MHz and dB, as the sheets print them. */
function printed(figures: string, per: number): CablePoint[] {
  return [...figures.matchAll(/([\d.]+): ([\d.]+)/g)].map(([, mhz, db]) => ({
    mhz: Number(mhz),
    dbPer100m: Number(db) / per,
  }));
}

const per100ft = (figures: string) => printed(figures, 0.3048);
const per100m = (figures: string) => printed(figures, 1);

/**
 * Published sheets differ by this part of the loss for one and the same "RG" number: 1.6 to 2.0 dB per 100 ft at 30 MHz
 * for RG-8X (ARRL General Class License Manual, table 6-1 erratum, against the sheet of type 9258).
 */
const BARE_NUMBER = 0.2;
/** Reel to reel, temperature and age of one maker's type (common practice, no source). */
const ONE_MAKER = 0.1;

/**
 * Published attenuation of common cables, a source each. All figures were seen second-hand, in collections that name
 * the sheet; none was read on the maker's own page. Leaving one point out of the fit, the curve comes back to it within
 * 3 % or the print's own rounding, except for type 8216, whose thin conductor over a steel core (from memory, not seen)
 * leaves the square root below 50 MHz: its curve misses the sheet by up to 6 %, inside what is claimed for it.
 */
export const CABLE_SHEETS: readonly CableSheet[] = [
  {
    name: "RG-58C/U (solid PE)",
    velocityFactor: 0.66,
    impedanceOhm: 50,
    lossUncertainty: BARE_NUMBER,
    source: "RG/U attenuation table, dB per 100 ft (second-hand: a compilation that quotes its row 58A, 58C)",
    points: per100ft("1: 0.44 10: 1.4 50: 3.3 100: 4.9 200: 7.4"),
  },
  {
    name: "RG-58A/U (type 8259)",
    velocityFactor: 0.66,
    impedanceOhm: 50,
    lossUncertainty: BARE_NUMBER,
    source:
      "sheet of type 8259, dB per 100 ft at 30 to 900 MHz (second-hand: a table checked against the sheet)",
    points: per100ft("30: 2.78 50: 3.7 150: 6.85 450: 13.4 900: 21.1"),
  },
  {
    name: "RG-213/U (solid PE)",
    velocityFactor: 0.66,
    impedanceOhm: 50,
    lossUncertainty: BARE_NUMBER,
    source:
      "RG/U attenuation table, dB per 100 ft (second-hand: a compilation that quotes its row 8, 8A, 10A, 213)",
    points: per100ft("1: 0.17 10: 0.55 50: 1.3 100: 1.9 200: 2.7"),
  },
  {
    name: "RG-8X (type 9258, foam PE)",
    velocityFactor: 0.78,
    impedanceOhm: 50,
    lossUncertainty: BARE_NUMBER,
    source:
      "sheet of type 9258, dB per 100 ft at 30 to 900 MHz (second-hand: a table checked against the sheet)",
    points: per100ft("30: 1.61 50: 2.1 150: 3.86 450: 7.06 900: 10.7"),
  },
  {
    name: "RG-174/U (type 8216)",
    velocityFactor: 0.66,
    impedanceOhm: 50,
    lossUncertainty: BARE_NUMBER,
    source:
      "sheet of type 8216, dB per 100 ft at 30 to 900 MHz (second-hand: a table checked against the sheet)",
    points: per100ft("30: 4.85 50: 5.8 150: 10.6 450: 20.5 900: 31"),
    steelCore: true,
  },
  {
    name: "RG-59/U (type 9259, foam PE, 75 Ω)",
    velocityFactor: 0.78,
    impedanceOhm: 75,
    lossUncertainty: BARE_NUMBER,
    source:
      "sheet of type 9259, dB per 100 ft at 30 to 900 MHz (second-hand: a table checked against the sheet)",
    points: per100ft("30: 1.61 50: 2.1 150: 3.8 450: 7.03 900: 10.1"),
  },
  {
    name: "LMR-195",
    velocityFactor: 0.83,
    impedanceOhm: 50,
    lossUncertainty: ONE_MAKER,
    source: "sheet of LMR-195, dB per 100 ft (second-hand: a table checked against the sheet)",
    points: per100ft("30: 2 50: 2.5 150: 4.4 450: 7.8 900: 11.1 1500: 14.5 2400: 18.6 5800: 29.9"),
  },
  {
    name: "LMR-240",
    velocityFactor: 0.84,
    impedanceOhm: 50,
    lossUncertainty: ONE_MAKER,
    source: "sheet of LMR-240, dB per 100 ft (second-hand: a table checked against the sheet)",
    points: per100ft("30: 1.3 50: 1.7 150: 3 450: 5.3 900: 7.6 1500: 9.9 2400: 12.6 5800: 20.4"),
  },
  {
    name: "LMR-400",
    velocityFactor: 0.85,
    impedanceOhm: 50,
    lossUncertainty: ONE_MAKER,
    source: "sheet of LMR-400, dB per 100 m (second-hand: an open list of cable sheets)",
    points: per100m(
      "30: 2.2 50: 2.9 150: 5 220: 6.1 450: 8.9 900: 12.8 1500: 16.8 1800: 18.6 2000: 19.6 2500: 22.2 5800: 35.5 8000: 42.7",
    ),
  },
  {
    name: "MRC-240",
    velocityFactor: 0.84,
    impedanceOhm: 50,
    lossUncertainty: ONE_MAKER,
    source: "sheet of MRC-240 (second-hand: an open list of cable sheets, satec.com.pl MRC-240.pdf)",
    points: per100m(
      "30: 4.4 150: 9.9 220: 12 450: 17.3 900: 24.8 1800: 35.6 2500: 42.4 5200: 63.3 5800: 66.8",
    ),
  },
  {
    name: "H500",
    velocityFactor: 0.81,
    impedanceOhm: 50,
    lossUncertainty: ONE_MAKER,
    source: "sheet of H500 (second-hand: an open list of cable sheets, belden.com h500c00)",
    points: per100m(
      "5: 0.9 50: 2.9 100: 4.1 200: 6 400: 8.7 600: 10.9 800: 12.9 1000: 14.6 1350: 17.4 1750: 20.3 2150: 23 2400: 24.6 5000: 38.9 10000: 61.7",
    ),
  },
  {
    name: "H1000",
    velocityFactor: 0.83,
    impedanceOhm: 50,
    lossUncertainty: ONE_MAKER,
    source: "sheet of H1000 (second-hand: an open list of cable sheets, belden.com h1000ch)",
    points: per100m(
      "5: 0.8 50: 2.8 100: 4 200: 5.7 400: 8.4 600: 10.5 800: 12.3 1000: 14 1350: 16.7 1750: 19.5 2150: 22.1 2400: 23.6 5000: 37.4 10000: 59.3",
    ),
  },
  {
    name: "5D-FB",
    velocityFactor: 0.82,
    impedanceOhm: 50,
    lossUncertainty: ONE_MAKER,
    source: "sheet of 5D-FB (second-hand: an open list of cable sheets, caledonian-cables.co.uk 5D-FB)",
    points: per100m(
      "100: 6.3 150: 7.8 280: 10.8 350: 12.1 400: 13 800: 18.9 900: 20.2 1200: 23.7 1500: 26.8 1800: 29.7 2000: 31.5 2500: 35.8",
    ),
  },
  {
    name: "LDF4-50A (foam, half inch)",
    velocityFactor: 0.88,
    impedanceOhm: 50,
    lossUncertainty: ONE_MAKER,
    source:
      "sheet of LDF4-50A (second-hand: an open list of cable sheets, commscope.com 115611-p360-ldf4-50a)",
    points: per100m(
      "0.5: 0.149 1: 0.211 2: 0.299 10: 0.672 20: 0.954 30: 1.172 50: 1.521 88: 2.031 100: 2.169 150: 2.673 200: 3.103 300: 3.835 450: 4.749 700: 6.009 1000: 7.284 1250: 8.226",
    ),
  },
  {
    name: "LDF5-50A (foam, 7/8 inch)",
    velocityFactor: 0.89,
    impedanceOhm: 50,
    lossUncertainty: ONE_MAKER,
    source: "LDF5-50A in a list of cable attenuations, dd1us.de, 27 April 2024",
    points: per100m("10: 0.37 14: 0.45 28: 0.63 50: 0.83 100: 1.19 144: 1.43 435: 2.6 1296: 4.7 2320: 6.6"),
  },
  {
    name: "RFA-1/2 (foam)",
    velocityFactor: 0.88,
    impedanceOhm: 50,
    lossUncertainty: ONE_MAKER,
    source: "sheet of RFA 1/2 (second-hand: an open list of cable sheets, radio.passus.pl RFA_1_2.pdf)",
    points: per100m(
      "10: 0.665 30: 1.16 50: 1.51 88: 2.01 100: 2.15 174: 2.86 200: 3.08 300: 3.81 450: 4.72 700: 5.98 1000: 7.26 1400: 8.74 2000: 10.7 3000: 13.4",
    ),
  },
  {
    name: "RFA-7/8 (foam)",
    velocityFactor: 0.9,
    impedanceOhm: 50,
    lossUncertainty: ONE_MAKER,
    source: "sheet of RFA 7/8 (second-hand: an open list of cable sheets, radio.passus.pl RFA_7_8.pdf)",
    points: per100m(
      "10: 0.348 30: 0.607 50: 0.787 88: 1.05 100: 1.12 174: 1.49 200: 1.61 300: 1.98 450: 2.46 700: 3.11 1000: 3.77 1400: 4.53 2000: 5.51 3000: 6.93",
    ),
  },
];
