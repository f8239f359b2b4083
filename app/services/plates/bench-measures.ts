/** What a bench's plate shows, in this order; as on the bench's page. */
export const BENCH_MEASURES = [
  { key: "directivityDb", title: "Directivity", hint: "higher is better" },
  { key: "openShortDisagreementDb", title: "Open against short", hint: "nearer to 0 dB is better" },
  { key: "trackingDb", title: "Error of the 0 dB line", hint: "at most" },
  { key: "testPortMatchDb", title: "Test port’s return loss", hint: "higher is better" },
  { key: "insertionLossDb", title: "Insertion loss", hint: "from the through sweep down to the 0 dB line" },
  { key: "flatnessDb", title: "Flatness", hint: "the 0 dB line over its own middle" },
] as const;

/** No bench of an experimenter's has more; what shows more is noise (common practice, no source). */
export const MOST_DB = 90;
