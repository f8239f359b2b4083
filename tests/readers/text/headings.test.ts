import { describe, expect, it } from "vitest";
import { frequencyUnitOf, plain, readHeading } from "../../../app/readers/text/headings.ts";

describe("readHeading", () => {
  it.each([
    ["Frequency (Hz)", "frequency"],
    ["freq_MHz", "frequency"],
    ["FreqMHz", "frequency"],
    ["f/GHz", "frequency"],
    ["MHz", "frequency"],
    ["X (Hz)", "frequency"],
    ["Frequenz [MHz]", "frequency"],
    ["Messfrequenz", "frequency"],
    ["Fréquence", "frequency"],
    ["Frecuencia (kHz)", "frequency"],
    ["Frequenza", "frequency"],
    ["Frequentie (MHz)", "frequency"],
    ["SWR", "swr"],
    ["VSWR", "swr"],
    ["s.w.r.", "swr"],
    ["Stehwellenverhältnis", "swr"],
    ["Welligkeit", "swr"],
    ["ROS", "swr"],
    ["TOS", "swr"],
    ["R.O.E.", "swr"],
    ["Rapport d'ondes stationnaires", "swr"],
    ["Taux d’ondes stationnaires", "swr"],
    ["Relación de onda estacionaria", "swr"],
    ["Rapporto d'onda stazionaria", "swr"],
    ["Staandegolfverhouding", "swr"],
    ["SGV", "swr"],
    ["Standing wave ratio", "swr"],
    ["Return Loss (dB)", "return-loss"],
    ["RL(dB)", "return-loss"],
    ["Rückflussdämpfung [dB]", "return-loss"],
    ["Rueckflussdaempfung", "return-loss"],
    ["Rückflußdämpfung", "return-loss"],
    ["Reflexionsdämpfung", "return-loss"],
    ["Anpassung", "return-loss"],
    ["Perte de retour (dB)", "return-loss"],
    ["Affaiblissement d'adaptation", "return-loss"],
    ["Pérdida de retorno", "return-loss"],
    ["Pérdidas de retorno (dB)", "return-loss"],
    ["Perdita di ritorno", "return-loss"],
    ["Retourverlies (dB)", "return-loss"],
    ["S11 (dB)", "s11-db"],
    ["S11 (LogMag)", "s11-db"],
    ["|S11| [dB]", "s11-db"],
    ["dB(S(1,1))", "s11-db"],
    ["Reflexionsfaktor (dB)", "s11-db"],
    ["S21 (dB)", "level"],
    ["Level (dBm)", "level"],
    ["Pegel [dBµV]", "level"],
    ["Trace A", "decibel"],
    ["Max Hold", "decibel"],
    ["Amplitude (dB)", "decibel"],
    ["S11", "reflection"],
    ["|S11|", "magnitude"],
    ["|Γ|", "magnitude"],
    ["rho", "magnitude"],
    ["ρ", "magnitude"],
    ["Reflection coefficient magnitude", "magnitude"],
    ["Betrag", "magnitude"],
    ["Phase (deg)", "angle"],
    ["S11 Phase", "angle"],
    ["Winkel/°", "angle"],
    ["Hoek", "angle"],
    ["Fase", "angle"],
    ["Angolo (gradi)", "angle"],
    ["Ángulo", "angle"],
    ["∠Γ (rad)", "angle"],
    ["Theta", "angle"],
    ["Re(S11)", "real"],
    ["s11.re", "real"],
    ["Realteil", "real"],
    ["Partie réelle", "real"],
    ["Im(S11)", "imaginary"],
    ["s11_imag", "imaginary"],
    ["Imaginärteil", "imaginary"],
    ["Partie imaginaire", "imaginary"],
    ["R (ohm)", "resistance"],
    ["Rs", "resistance"],
    ["Re(Z)", "resistance"],
    ["Résistance (Ω)", "resistance"],
    ["Wirkwiderstand", "resistance"],
    ["Weerstand", "resistance"],
    ["X (ohm)", "reactance"],
    ["Xs", "reactance"],
    ["Im(Z)", "reactance"],
    ["|X|", "reactance"],
    ["Blindwiderstand", "reactance"],
    ["Réactance", "reactance"],
    ["Reattanza", "reactance"],
    ["|Z| (ohm)", "impedance"],
    ["Z", "impedance"],
    ["Impedanz", "impedance"],
    ["Scheinwiderstand", "impedance"],
    ["Time", "other"],
    ["Datum", "other"],
    ["Index", "other"],
    ["#", "other"],
    ["Q", "other"],
    ["", "unknown"],
    ["whatever", "unknown"],
  ])("%s is %s", (text, role) => {
    expect(readHeading(text).role).toBe(role);
  });

  it("reads units: kilohm, percent, radians", () => {
    expect(readHeading("R [kΩ]").scale).toBe(1000);
    expect(readHeading("Reflection coefficient (%)").scale).toBe(0.01);
    expect(readHeading("Phase (rad)").angleUnit).toBe("rad");
    expect(readHeading("Winkel/°").angleUnit).toBe("deg");
  });

  it("names the parameter, and the sign that is lost", () => {
    expect(readHeading("S22 (dB)").parameter).toBe("s22");
    expect(readHeading("Phase Z").parameter).toBe("z");
    expect(readHeading("|X| (ohm)").unsigned).toBe(true);
    expect(readHeading("X (ohm)").unsigned).toBe(false);
  });
});

describe("frequencyUnitOf", () => {
  it.each([
    ["Freq (GHz)", "GHz"],
    ["frequency_mhz", "MHz"],
    ["KHZ", "kHz"],
    ["hz", "Hz"],
    ["Frequency", null],
    ["Hertzian", null],
  ])("%s: %s", (text, unit) => {
    expect(frequencyUnitOf(plain(text))).toBe(unit);
  });
});
