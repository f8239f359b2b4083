import { index, layout, prefix, type RouteConfig, route } from "@react-router/dev/routes";

/** The site map. Paths are fixed: addresses that were given out must keep working. */
export default [
  index("routes/home/home.tsx"),

  route("sign-in", "routes/account/sign-in.tsx"),
  route("auth/github", "routes/account/github.ts"),
  route("auth/github/callback", "routes/account/github-callback.ts"),
  route("sign-out", "routes/account/sign-out.ts"),
  route("settings", "routes/account/settings.tsx"),
  route("settings/tokens", "routes/account/tokens.tsx"),
  route("theme", "routes/account/theme.ts"),
  route("cautions/dismiss", "routes/account/caution.ts"),

  route("projects", "routes/projects/list.tsx"),
  route("projects/new", "routes/projects/new.tsx"),
  layout("routes/projects/layout.tsx", [
    ...prefix("projects/:project", [
      index("routes/projects/project.tsx"),
      route("members", "routes/projects/members.tsx"),
      route("settings", "routes/projects/settings.tsx"),
      route("sweeps", "routes/sweeps/list.tsx"),
      route("sweeps/new", "routes/sweeps/new.tsx"),
      route("sweeps/:sweep", "routes/sweeps/sweep.tsx"),
      route("sweeps/:sweep/reading", "routes/sweeps/reading.tsx"),
      route("dips/:dip", "routes/dips/dip.tsx"),
      route("benches", "routes/benches/list.tsx"),
      route("benches/new", "routes/benches/new.tsx"),
      route("benches/:bench", "routes/benches/bench.tsx"),
      route("benches/:bench/edit", "routes/benches/edit.tsx"),
      route("benches/:bench/rebuild", "routes/benches/rebuild.tsx"),
      route("benches/:bench/compare", "routes/benches/compare.tsx"),
      route("antenna", "routes/antenna/antenna.tsx"),
      route("antenna/edit", "routes/antenna/edit.tsx"),
    ]),
  ]),
  ...prefix("projects/:project", [
    route("sweeps/upload", "routes/sweeps/upload.ts"),
    route("sweeps/:sweep/original", "routes/sweeps/original.ts"),
    route("sweeps/:sweep/picture", "routes/sweeps/picture.ts"),
    route("sweeps/:sweep/points.json", "routes/sweeps/points.ts"),
    route("sweeps/:sweep/sweep.csv", "routes/sweeps/csv.ts"),
    route("sweeps/:sweep/sweep.s1p", "routes/sweeps/touchstone.ts"),
    route("sweeps/:sweep/reading/try", "routes/sweeps/reading-try.ts"),
    route("photographs", "routes/photographs/photographs.ts"),
    route("photographs/:photograph/:size", "routes/photographs/photograph.ts"),
    route("notes", "routes/notes/notes.ts"),
    route("notes/:note", "routes/notes/note.tsx"),
    route("dips/:dip/verdict", "routes/dips/verdict.ts"),
  ]),
  route("notes/preview", "routes/notes/preview.ts"),

  route("admin", "routes/admin/admin.tsx"),

  ...prefix("api/v1", [
    route("openapi.json", "routes/api/openapi.ts"),
    route("projects", "routes/api/projects.ts"),
    route("projects/:project", "routes/api/project.ts"),
    route("projects/:project/sweeps", "routes/api/sweeps.ts"),
    route("sweeps/:sweep", "routes/api/sweep.ts"),
    route("sweeps/:sweep/points", "routes/api/points.ts"),
    route("dips/:dip/notes", "routes/api/notes.ts"),
    route("*", "routes/api/missing.ts"),
  ]),
  route("*", "routes/home/missing.tsx"),
] satisfies RouteConfig;
