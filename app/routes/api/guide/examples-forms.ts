import type { Example, ExampleGroup } from "./example.ts";

/** Worked examples of what anybody asks without a token, outside of /api/v1. */

export const FORM_EXAMPLES: ExampleGroup = {
  title: "For everybody, without a token",
  examples: [
    {
      operation: "readPlate",
      says: "The address of a plate gives its page, or the form that is asked for.",
      path: "/plates/{plate}",
      accept: "text/csv",
      saves: "reeds-plate.csv",
      open: true,
    },
    ofPlate("getPlateSvg", "The figure, to be set into a page.", ".svg?theme=dark", "reeds.svg"),
    ofPlate("getPlatePng", "The same as a picture.", ".png?width=1280", "reeds.png"),
    ofPlate("getPlatePdf", "A page to print.", ".pdf", "reeds.pdf"),
    ofPlate("getPlateCsv", "Its numbers.", ".csv", "reeds.csv"),
    ofPlate("getPlateTouchstone", "Its sweep, as it was frozen.", ".s1p", "reeds.s1p"),
    ofPlate("getPlateRecord", "All that it says. It never changes.", ".json"),
    ofPlate("getPlateBibtex", "How to cite it.", ".bib", "reeds.bib"),
    ofPlate("getPlateCslJson", "The same for programs that keep references.", ".csl.json", "reeds-csl.json"),
    ofPlate("getPlateEmbed", "A page for a frame on another site.", "/embed", "reeds.html"),
    {
      operation: "getOembed",
      says: "The frame itself, as large as there is room.",
      path: "/oembed?url={origin}/plates/{plate}&maxwidth=640",
      open: true,
    },
    ofWriteUp("readWriteUp", "A published write-up.", "", "reeds-page.html"),
    ofWriteUp(
      "getWriteUpHtml",
      "The same as one file that opens from a disk.",
      ".html",
      "eight-radials.html",
    ),
    ofWriteUp("getWriteUpPdf", "And as PDF.", ".pdf", "eight-radials.pdf"),
    {
      operation: "getWriteUpFeed",
      says: "What a project published, for feed readers.",
      path: "/projects/{project}/write-ups.atom",
      saves: "reeds.atom",
      open: true,
    },
    {
      operation: "sendMention",
      says: "Say that a page of yours links to a plate. The link is looked up in a while.",
      path: "/webmention",
      form: { source: "https://notes.example/reeds", target: "{origin}/plates/{plate}" },
      saves: "answer.html",
      open: true,
    },
  ],
};

function ofPlate(operation: string, says: string, ending: string, saves?: string): Example {
  return { operation, says, path: `/plates/{plate}${ending}`, open: true, ...(saves && { saves }) };
}

function ofWriteUp(operation: string, says: string, ending: string, saves: string): Example {
  return { operation, says, path: `/write-ups/{writeUp}${ending}`, open: true, saves };
}
