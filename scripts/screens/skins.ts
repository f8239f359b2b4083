import type { Random } from "./random.ts";

/** Colours and manners of an invented screen or report. */
export interface Skin {
  name: string;
  outer: string;
  inner: string;
  ink: string;
  grid: string;
  outline: string;
  trace: string;
  second: string;
  font: string;
}

const FONTS = ["DejaVu Sans", "DejaVu Sans Mono", "DejaVu Serif", "Liberation Sans", "Liberation Mono"];

const DARK: Omit<Skin, "font">[] = [
  {
    name: "tar",
    outer: "#17181c",
    inner: "#0d0e11",
    ink: "#d9d6cc",
    grid: "#34363d",
    outline: "#6c6f78",
    trace: "#ffb02e",
    second: "#6fa8dc",
  },
  {
    name: "moss",
    outer: "#101a12",
    inner: "#0a130c",
    ink: "#b7d8b0",
    grid: "#22402a",
    outline: "#3f7049",
    trace: "#a8ff60",
    second: "#d8a657",
  },
  {
    name: "plum",
    outer: "#241829",
    inner: "#170f1b",
    ink: "#e6d7ea",
    grid: "#43304a",
    outline: "#7d6388",
    trace: "#ff7ac6",
    second: "#7fd4c1",
  },
  {
    name: "deep",
    outer: "#0e2236",
    inner: "#081624",
    ink: "#cfe3f2",
    grid: "#1f4260",
    outline: "#4a7ba3",
    trace: "#f4f1de",
    second: "#e07a5f",
  },
  {
    name: "coal",
    outer: "#000000",
    inner: "#000000",
    ink: "#ffffff",
    grid: "#4d4d4d",
    outline: "#9a9a9a",
    trace: "#36d7ff",
    second: "#ff5470",
  },
];

const LIGHT: Omit<Skin, "font">[] = [
  {
    name: "paper",
    outer: "#ffffff",
    inner: "#ffffff",
    ink: "#1c1c1c",
    grid: "#d3d3d3",
    outline: "#303030",
    trace: "#0b6e4f",
    second: "#9c6ade",
  },
  {
    name: "sand",
    outer: "#efe7d6",
    inner: "#fbf7ee",
    ink: "#3a2f1e",
    grid: "#ded2ba",
    outline: "#7c6b4d",
    trace: "#a4243b",
    second: "#3066be",
  },
  {
    name: "mist",
    outer: "#dde5ea",
    inner: "#f3f6f8",
    ink: "#22313f",
    grid: "#c5d0d8",
    outline: "#708090",
    trace: "#1d3fbb",
    second: "#c05621",
  },
  {
    name: "leaf",
    outer: "#e3eedd",
    inner: "#f4faf1",
    ink: "#20331a",
    grid: "#cbdcc2",
    outline: "#5b7a50",
    trace: "#5b1a8c",
    second: "#b8860b",
  },
  {
    name: "slate",
    outer: "#f2f2f2",
    inner: "#e4e6ea",
    ink: "#2b2b2b",
    grid: "#ffffff",
    outline: "#8d949e",
    trace: "#c23b00",
    second: "#2a9d8f",
  },
];

export function pickSkin(random: Random): Skin {
  return { ...random.pick(random.chance(0.55) ? DARK : LIGHT), font: random.pick(FONTS) };
}
