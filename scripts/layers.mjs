import path from "node:path";
import { fileURLToPath } from "node:url";
import { layerFaults } from "./layer-faults.mjs";

/** Fails when an import points up or goes round in a circle: `node scripts/layers.mjs [folder with an app/]`. */
const root = path.resolve(process.argv[2] ?? path.dirname(path.dirname(fileURLToPath(import.meta.url))));
const faults = layerFaults(root);
for (const fault of faults) console.error(fault);
if (faults.length > 0) {
  console.error(`${faults.length} fault${faults.length === 1 ? "" : "s"}: see ARCHITECTURE in DEVELOPERS.md`);
  process.exitCode = 1;
}
