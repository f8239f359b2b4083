/** As much of the program as the test of citations calls; it has no types of its own. */
declare module "citeproc" {
  interface System {
    retrieveLocale(): string;
    retrieveItem(id: string): unknown;
  }
  class Engine {
    constructor(system: System, style: string);
    updateItems(ids: string[]): void;
    makeBibliography(): [object, string[]];
  }
  const CSL: { Engine: typeof Engine };
  export default CSL;
}
