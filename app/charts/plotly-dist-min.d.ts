declare module "plotly.js-dist-min" {
  import type * as Plotly from "plotly.js";

  const bundle: typeof Plotly;
  export default bundle;
}
