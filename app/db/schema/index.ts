export * from "./notes.ts";
export * from "./people.ts";
export * from "./projects.ts";
export * from "./sweeps.ts";
export * from "./work.ts";
