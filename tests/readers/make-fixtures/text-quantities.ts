import { comma, type Fixture, fixture, lines } from "./fixture.ts";
import { angleDeg, HF, magnitude, type Point, s11Db, swr, UHF, VHF } from "./model.ts";

const z = (p: Point) => Math.hypot(p.r, p.x);
const zAngle = (p: Point) => (Math.atan2(p.x, p.r) * 180) / Math.PI;
const ZERO_DB = -10.4;
const level = (p: Point) => ZERO_DB + s11Db(p);
const HF75 = { ...HF, referenceOhm: 75 };

/** Troubles of quantity: what the columns hold, how many there are, which belong together. */
export const QUANTITIES: Fixture[] = [
  fixture(
    "many-columns.csv",
    "Return loss, phase, R, SWR, X, Z and its angle together.",
    { model: HF, quantity: "gamma" },
    (p) =>
      lines([
        "Frequency(Hz),Return Loss(dB),Phase(deg),Rs,SWR,Xs,|Z|,Theta",
        ...p.map((q) =>
          [
            (q.mhz * 1e6).toFixed(0),
            (-s11Db(q)).toFixed(3),
            angleDeg(q).toFixed(2),
            q.r.toFixed(2),
            swr(q).toFixed(3),
            q.x.toFixed(2),
            z(q).toFixed(2),
            zAngle(q).toFixed(2),
          ].join(","),
        ),
      ]),
  ),
  fixture("real-imaginary.csv", "Real and imaginary part.", { model: HF, quantity: "gamma" }, (p) =>
    lines([
      "Frequency (MHz);Re(S11);Im(S11)",
      ...p.map((q) => `${q.mhz.toFixed(4)};${q.re.toFixed(6)};${q.im.toFixed(6)}`),
    ]),
  ),
  fixture("magnitude-degrees.csv", "Magnitude and angle in degrees.", { model: HF, quantity: "gamma" }, (p) =>
    lines([
      "Frequenz/MHz;|S11|;Winkel/°",
      ...p.map((q) => `${comma(q.mhz, 4)};${comma(magnitude(q), 6)};${comma(angleDeg(q), 3)}`),
    ]),
  ),
  fixture("magnitude-radians.tsv", "Magnitude and angle in radians.", { model: HF, quantity: "gamma" }, (p) =>
    lines([
      "f (MHz)\t|Γ|\t∠Γ (rad)",
      ...p.map(
        (q) =>
          `${q.mhz.toFixed(4)}\t${magnitude(q).toFixed(6)}\t${((angleDeg(q) * Math.PI) / 180).toFixed(5)}`,
      ),
    ]),
  ),
  fixture("db-angle.csv", "S11 as log magnitude, with phase.", { model: HF, quantity: "gamma" }, (p) =>
    lines([
      "freq (Hz),S11 (LogMag),S11 (Phase)",
      ...p.map((q) => `${(q.mhz * 1e6).toFixed(0)},${s11Db(q).toFixed(4)},${angleDeg(q).toFixed(3)}`),
    ]),
  ),
  fixture(
    "impedance-angle.csv",
    "Magnitude and angle of the impedance, Italian.",
    { model: HF, quantity: "impedance" },
    (p) =>
      lines([
        "Frequenza (MHz);Impedenza (ohm);Angolo (gradi)",
        ...p.map((q) => `${comma(q.mhz, 4)};${comma(z(q), 4)};${comma(zAngle(q), 4)}`),
      ]),
  ),
  fixture(
    "unsigned-reactance.csv",
    "The reactance has lost its sign.",
    { model: HF, quantity: "impedance" },
    (p) =>
      lines([
        "MHz,R (ohm),X (ohm)",
        ...p.map((q) => `${q.mhz.toFixed(4)},${q.r.toFixed(3)},${Math.abs(q.x).toFixed(3)}`),
      ]),
  ),
  fixture(
    "r-x-75-ohm.csv",
    "Impedance with a 75 Ω reference named above.",
    { model: HF75, quantity: "impedance" },
    (p) =>
      lines([
        "Messung am Mast",
        "Bezugsimpedanz;75;Ohm",
        "Frequenz (MHz);Wirkwiderstand (Ω);Blindwiderstand (Ω)",
        ...p.map((q) => `${comma(q.mhz, 4)};${comma(q.r, 4)};${comma(q.x, 4)}`),
      ]),
  ),
  fixture(
    "level-dbm.csv",
    "Levels in dBm that need a 0 dB line.",
    { model: HF, quantity: "level", zeroDb: ZERO_DB },
    (p) =>
      lines(["Frequency (MHz),Level (dBm)", ...p.map((q) => `${q.mhz.toFixed(4)},${level(q).toFixed(3)}`)]),
  ),
  fixture(
    "traces-a-b.csv",
    "Two traces and a held maximum, the first one live.",
    { model: HF, quantity: "level", zeroDb: ZERO_DB },
    (p) =>
      lines([
        "Frequency [Hz];Trace A [dBm];Trace B [dBm];Max Hold [dBm]",
        ...p.map(
          (q) =>
            `${(q.mhz * 1e6).toFixed(0)};${level(q).toFixed(3)};${(ZERO_DB - 0.05).toFixed(2)};${(level(q) + 0.4).toFixed(2)}`,
        ),
      ]),
  ),
  fixture(
    "frequency-pairs.csv",
    "A frequency column of its own for every trace.",
    { model: VHF, quantity: "s11-db" },
    (p) =>
      lines([
        "Freq A (MHz),S11 A (dB),Freq B (MHz),S11 B (dB)",
        ...p.map(
          (q) =>
            `${q.mhz.toFixed(3)},${s11Db(q).toFixed(3)},${(q.mhz + 100).toFixed(3)},${(s11Db(q) / 2).toFixed(3)}`,
        ),
      ]),
  ),
  fixture(
    "s21-before-s11.csv",
    "A transmission stands before the reflection.",
    { model: VHF, quantity: "s11-db" },
    (p) =>
      lines([
        "Frequency (MHz),S21 (dB),S11 (dB),S22 (dB)",
        ...p.map(
          (q, i) =>
            `${q.mhz.toFixed(3)},${(-20 - (i % 9) / 10).toFixed(2)},${s11Db(q).toFixed(3)},${(s11Db(q) / 3).toFixed(3)}`,
        ),
      ]),
  ),
  fixture(
    "infinite-swr.csv",
    "An SWR that is infinite at the ends, and one over its display.",
    { model: HF, quantity: "swr" },
    (p) =>
      lines([
        "Frequency (MHz),SWR",
        ...p.map(
          (q, i) =>
            `${q.mhz.toFixed(4)},${i < 3 ? "∞" : i > 273 ? "inf" : i === 4 ? ">99.9" : swr(q).toFixed(4)}`,
        ),
      ]),
  ),
  fixture("percent.csv", "Reflection in percent of the voltage.", { model: VHF, quantity: "gamma" }, (p) =>
    lines([
      "Frequenz (MHz);Reflexionsfaktor",
      ...p.map((q) => `${comma(q.mhz, 3)};${comma(100 * magnitude(q), 3)} %`),
    ]),
  ),
  fixture(
    "minus-return-loss.csv",
    "Called return loss, written with a minus sign.",
    { model: VHF, quantity: "s11-db" },
    (p) =>
      lines([
        "Frequency (MHz),Return Loss (dB)",
        ...p.map((q) => `${q.mhz.toFixed(3)},${s11Db(q).toFixed(3)}`),
      ]),
  ),
  fixture(
    "group-headings.csv",
    "Headings on two lines: parameter above part.",
    { model: VHF, quantity: "gamma" },
    (p) =>
      lines([
        ",S21,,S11,",
        "Frequency (MHz),Re,Im,Re,Im",
        ...p.map((q) => `${q.mhz.toFixed(3)},0.001,0.002,${q.re.toFixed(6)},${q.im.toFixed(6)}`),
      ]),
  ),
  fixture(
    "bare-real-imaginary.txt",
    "Three columns without heading: real and imaginary part.",
    { model: VHF, quantity: "gamma" },
    (p) => lines(p.map((q) => `${q.mhz.toFixed(3)} ${q.re.toFixed(6)} ${q.im.toFixed(6)}`)),
  ),
  fixture(
    "bare-r-x.csv",
    "Three columns without heading: resistance and reactance.",
    { model: HF, quantity: "impedance" },
    (p) => lines(p.map((q) => `${(q.mhz * 1e6).toFixed(0)},${q.r.toFixed(4)},${q.x.toFixed(4)}`)),
  ),
  fixture("kilo-ohm.csv", "Impedance in kilohm.", { model: UHF, quantity: "impedance" }, (p) =>
    lines([
      "f [MHz];R [kΩ];X [kΩ]",
      ...p.map((q) => `${comma(q.mhz, 2)};${comma(q.r / 1e3, 6)};${comma(q.x / 1e3, 6)}`),
    ]),
  ),
  fixture("rho.csv", "Magnitude alone, called rho.", { model: VHF, quantity: "gamma" }, (p) =>
    lines(["MHz,rho", ...p.map((q) => `${q.mhz.toFixed(3)},${magnitude(q).toFixed(5)}`)]),
  ),
];
