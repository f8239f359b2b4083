import { comma, type Fixture, fixture, grouped, latin1, lines, utf16, withBom } from "./fixture.ts";
import { HF, s11Db, swr, TOPBAND, UHF, VHF } from "./model.ts";

/** Troubles of writing: delimiters, decimal marks, encodings, line ends, languages, units. */
export const WRITING: Fixture[] = [
  fixture("comma-hz.csv", "Plain comma file in hertz.", { model: HF, quantity: "s11-db" }, (p) =>
    lines(["Frequency (Hz),S11 (dB)", ...p.map((q) => `${(q.mhz * 1e6).toFixed(0)},${s11Db(q).toFixed(4)}`)]),
  ),
  fixture(
    "rueckfluss-latin1.csv",
    "German, semicolon, decimal comma, Latin-1, CRLF.",
    { model: HF, quantity: "return-loss", encode: latin1 },
    (p) =>
      lines(
        [
          "Frequenz [MHz];Rückflußdämpfung [dB]",
          ...p.map((q) => `${comma(q.mhz, 4)};${comma(-s11Db(q), 3)}`),
        ],
        "\r\n",
      ),
  ),
  fixture(
    "stehwelle-bom.tsv",
    "German, tab, decimal comma, UTF-8 with byte order mark.",
    { model: HF, quantity: "swr", encode: withBom },
    (p) =>
      lines([
        "Frequenz (MHz)\tStehwellenverhältnis",
        ...p.map((q) => `${comma(q.mhz, 4)}\t${comma(swr(q), 4)}`),
      ]),
  ),
  fixture(
    "fixed-width.txt",
    "Aligned with runs of blanks, heading words with blanks in them.",
    { model: VHF, quantity: "return-loss" },
    (p) =>
      lines([
        "   Frequency (MHz)     Return Loss (dB)",
        ...p.map((q) => `${q.mhz.toFixed(3).padStart(15)}${(-s11Db(q)).toFixed(3).padStart(20)}`),
      ]),
  ),
  fixture(
    "utf16le-bom.txt",
    "Spreadsheet's Unicode text: UTF-16, tabs, CRLF.",
    { model: HF, quantity: "swr", encode: (t) => utf16(t) },
    (p) =>
      lines(["Frequency (MHz)\tSWR", ...p.map((q) => `${q.mhz.toFixed(4)}\t${swr(q).toFixed(4)}`)], "\r\n"),
  ),
  fixture(
    "utf16be-bom.csv",
    "UTF-16 big-endian.",
    { model: HF, quantity: "s11-db", encode: (t) => utf16(t, { big: true }) },
    (p) => lines(["Fréquence (MHz);S11 (dB)", ...p.map((q) => `${comma(q.mhz, 4)};${comma(s11Db(q), 3)}`)]),
  ),
  fixture(
    "utf16le-bare.csv",
    "UTF-16 without a byte order mark.",
    { model: VHF, quantity: "s11-db", encode: (t) => utf16(t, { bom: false }) },
    (p) => lines(["MHz,S11 dB", ...p.map((q) => `${q.mhz.toFixed(3)},${s11Db(q).toFixed(3)}`)]),
  ),
  fixture("cr-only.csv", "Carriage returns alone end the lines.", { model: VHF, quantity: "swr" }, (p) =>
    lines(["MHz,SWR", ...p.map((q) => `${q.mhz.toFixed(3)},${swr(q).toFixed(4)}`)], "\r"),
  ),
  fixture(
    "mixed-ends.csv",
    "All three line ends in one file, none behind the last line.",
    { model: VHF, quantity: "swr" },
    (p) =>
      ["MHz,VSWR", ...p.map((q) => `${q.mhz.toFixed(3)},${swr(q).toFixed(4)}`)].reduce(
        (all, line, i) => all + ["\n", "\r\n", "\r"][i % 3] + line,
      ),
  ),
  fixture("francais-ros.csv", "French: ROS, Latin-1.", { model: HF, quantity: "swr", encode: latin1 }, (p) =>
    lines(["Fréquence (MHz);ROS", ...p.map((q) => `${comma(q.mhz, 3)};${comma(swr(q), 3)}`)], "\r\n"),
  ),
  fixture(
    "francais-rapport.csv",
    "French: the ratio written out, kilohertz.",
    { model: HF, quantity: "swr" },
    (p) =>
      lines([
        "Fréquence [kHz];Rapport d'ondes stationnaires",
        ...p.map((q) => `${(q.mhz * 1e3).toFixed(0)};${comma(swr(q), 3)}`),
      ]),
  ),
  fixture("francais-perte.csv", "French: return loss.", { model: HF, quantity: "return-loss" }, (p) =>
    lines([
      "Fréquence (MHz);Perte de retour (dB)",
      ...p.map((q) => `${comma(q.mhz, 3)};${comma(-s11Db(q), 2)}`),
    ]),
  ),
  fixture("espanol-roe.csv", "Spanish: ROE, whole kilohertz.", { model: HF, quantity: "swr" }, (p) =>
    lines(["Frecuencia (kHz);ROE", ...p.map((q) => `${(q.mhz * 1e3).toFixed(0)};${comma(swr(q), 4)}`)]),
  ),
  fixture(
    "espanol-perdida.csv",
    "Spanish: return loss written with a minus sign.",
    { model: HF, quantity: "s11-db" },
    (p) =>
      lines([
        "Frecuencia (MHz);Pérdida de retorno (dB)",
        ...p.map((q) => `${comma(q.mhz, 3)};${comma(s11Db(q), 3)}`),
      ]),
  ),
  fixture("italiano-perdita.csv", "Italian: return loss.", { model: HF, quantity: "return-loss" }, (p) =>
    lines([
      "Frequenza [MHz];Perdita di ritorno [dB]",
      ...p.map((q) => `${comma(q.mhz, 3)};${comma(-s11Db(q), 3)}`),
    ]),
  ),
  fixture("italiano-ratio.csv", "Italian: SWR as a ratio to one.", { model: HF, quantity: "swr" }, (p) =>
    lines(["Frequenza (MHz);ROS", ...p.map((q) => `${comma(q.mhz, 3)};${comma(swr(q), 3)}:1`)]),
  ),
  fixture("nederlands-verlies.csv", "Dutch: return loss.", { model: HF, quantity: "return-loss" }, (p) =>
    lines([
      "Frequentie (MHz);Retourverlies (dB)",
      ...p.map((q) => `${comma(q.mhz, 3)};${comma(-s11Db(q), 3)}`),
    ]),
  ),
  fixture(
    "nederlands-sgv.tsv",
    "Dutch: standing wave ratio in one word.",
    { model: VHF, quantity: "swr" },
    (p) =>
      lines([
        "Frequentie MHz\tStaandegolfverhouding",
        ...p.map((q) => `${comma(q.mhz, 2)}\t${comma(swr(q), 4)}`),
      ]),
  ),
  fixture(
    "sep-line.csv",
    "First line names the delimiter, every cell is quoted.",
    { model: VHF, quantity: "s11-db" },
    (p) =>
      lines(
        [
          "sep=;",
          '"Freq. [MHz]";"S11 [dB]"',
          ...p.map((q) => `"${comma(q.mhz, 3)}";"${comma(s11Db(q), 3)}"`),
        ],
        "\r\n",
      ),
  ),
  fixture(
    "quoted-comma.csv",
    "Decimal comma inside quotes, comma between cells.",
    { model: VHF, quantity: "return-loss" },
    (p) =>
      lines([
        '"Frequenz, MHz","Anpassung, dB"',
        ...p.map((q) => `"${comma(q.mhz, 3)}","${comma(-s11Db(q), 3)}"`),
      ]),
  ),
  fixture(
    "thousands-dot.csv",
    "Hertz with dots between thousands, decimal comma.",
    { model: HF, quantity: "s11-db" },
    (p) =>
      lines([
        "Frequenz (Hz);S11 (dB)",
        ...p.map((q) => `${grouped(q.mhz * 1e6, ".")};${comma(s11Db(q), 3)}`),
      ]),
  ),
  fixture(
    "thousands-apostrophe.csv",
    "Hertz with apostrophes between thousands.",
    { model: HF, quantity: "swr" },
    (p) => lines(["Frequenz (Hz);SWR", ...p.map((q) => `${grouped(q.mhz * 1e6, "'")};${swr(q).toFixed(3)}`)]),
  ),
  fixture(
    "thousands-nbsp.csv",
    "Kilohertz with no-break spaces between thousands.",
    { model: HF, quantity: "swr" },
    (p) =>
      lines([
        "Fréquence (kHz);TOS",
        ...p.map((q) => `${grouped(q.mhz * 1e3, "\u202f")};${comma(swr(q), 3)}`),
      ]),
  ),
  fixture(
    "thousands-comma.csv",
    "Hertz with commas between thousands, semicolons between cells.",
    { model: HF, quantity: "s11-db" },
    (p) =>
      lines([
        "Frequency (Hz);S11 (dB)",
        ...p.map((q) => `${grouped(q.mhz * 1e6, ",")};${s11Db(q).toFixed(3)}`),
      ]),
  ),
  fixture(
    "unicode-minus.csv",
    "Minus signs as typographers set them.",
    { model: VHF, quantity: "s11-db" },
    (p) =>
      lines([
        "Frequency (MHz),S11 (dB)",
        ...p.map((q) => `${q.mhz.toFixed(2)},${s11Db(q).toFixed(3).replace("-", "\u2212")}`),
      ]),
  ),
  fixture("units-line.csv", "Units on a line of their own.", { model: UHF, quantity: "s11-db" }, (p) =>
    lines(["Frequenz;Reflexion", "[MHz];[dB]", ...p.map((q) => `${comma(q.mhz, 1)};${comma(s11Db(q), 2)}`)]),
  ),
  fixture("glued-units.csv", "Units behind every number.", { model: VHF, quantity: "s11-db" }, (p) =>
    lines(["Frequency,S11", ...p.map((q) => `${q.mhz.toFixed(3)} MHz,${s11Db(q).toFixed(2)}dB`)]),
  ),
  fixture(
    "changing-units.txt",
    "Units behind every number change from kHz to MHz on the way.",
    { model: TOPBAND, quantity: "return-loss" },
    (p) =>
      lines([
        "Frequency\tReturn loss",
        ...p.map(
          (q) =>
            `${q.mhz < 1.8 ? `${(q.mhz * 1e3).toFixed(1)} kHz` : `${q.mhz.toFixed(4)} MHz`}\t${(-s11Db(q)).toFixed(2)} dB`,
        ),
      ]),
  ),
  fixture("gigahertz.csv", "Gigahertz.", { model: UHF, quantity: "swr" }, (p) =>
    lines(["f/GHz,VSWR", ...p.map((q) => `${(q.mhz / 1e3).toFixed(5)},${swr(q).toFixed(4)}`)]),
  ),
  fixture("exponents.csv", "Scientific notation in both columns.", { model: HF, quantity: "s11-db" }, (p) =>
    lines([
      "freq[Hz],s11[dB]",
      ...p.map((q) => `${(q.mhz * 1e6).toExponential(6)},${s11Db(q).toExponential(5)}`),
    ]),
  ),
  fixture(
    "fortran-exponents.txt",
    "Exponents with D, as old programs print them.",
    { model: HF, quantity: "swr" },
    (p) =>
      lines([
        "      FREQ(MHZ)        SWR",
        ...p.map(
          (q) =>
            `  ${q.mhz.toExponential(6).replace("e", "D")}  ${swr(q).toExponential(6).replace("e", "D")}`,
        ),
      ]),
  ),
];
