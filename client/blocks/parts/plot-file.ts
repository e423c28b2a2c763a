/** A plot as a file of its own: a drawing that needs no style sheet, a picture made from it, or its numbers. */
import { download } from "../../ui/download.ts";
import { standAlone } from "../../ui/svg-file.ts";
import type { PlotTable } from "./plot-model.ts";

/** Pixels of a picture for one of the drawing: enough for print at a column's width. */
const FINENESS = 4;
const MARGIN = 8;

/** False when the browser makes no pictures. */
export async function savePlot(
  format: "SVG" | "PNG" | "CSV",
  drawing: SVGSVGElement,
  name: string,
  table: PlotTable,
): Promise<boolean> {
  if (format === "CSV") {
    download(`${name}.csv`, "text/csv", csvText(table));
    return true;
  }
  const { text, width, height } = svgFile(drawing, name);
  if (format === "SVG") {
    download(`${name}.svg`, "image/svg+xml", text);
    return true;
  }
  const picture = await pictureOf(text, width * FINENESS, height * FINENESS);
  if (picture) download(`${name}.png`, "image/png", picture);
  return picture !== null;
}

/** CSV as RFC 4180 has it: every number with all its digits, nothing where there is none. */
export function csvText({ heads, rows }: PlotTable): string {
  const quoted = (text: string) => (/[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text);
  return [
    heads.map(quoted).join(","),
    ...rows.map((row) => row.map((value) => (value === null ? "" : String(value))).join(",")),
  ]
    .map((line) => `${line}\r\n`)
    .join("");
}

/** The drawing on its own ground, wide enough for the names at the ends of its curves. */
export function svgFile(
  drawing: SVGSVGElement,
  name: string,
): { readonly text: string; readonly width: number; readonly height: number } {
  const copy = standAlone(drawing);
  for (const mark of copy.querySelectorAll("[data-reading]")) mark.remove();
  const [, , frameWidth = 340, frameHeight = 208] = (drawing.getAttribute("viewBox") ?? "")
    .split(" ")
    .map(Number);
  const width = Math.ceil(
    Math.max(frameWidth, ...[...copy.querySelectorAll("text")].map(endOf)) + 2 * MARGIN,
  );
  const height = frameHeight + 2 * MARGIN;
  const ground = document.createElementNS("http://www.w3.org/2000/svg", "rect");
  for (const [attribute, value] of Object.entries({
    x: -MARGIN,
    y: -MARGIN,
    width,
    height,
    fill: getComputedStyle(drawing).getPropertyValue("--paper").trim() || "white",
  }))
    ground.setAttribute(attribute, String(value));
  const title = document.createElementNS("http://www.w3.org/2000/svg", "title");
  title.textContent = name;
  copy.prepend(title, ground);
  copy.setAttribute("viewBox", `${-MARGIN} ${-MARGIN} ${width} ${height}`);
  copy.setAttribute("width", String(width));
  copy.setAttribute("height", String(height));
  return { text: new XMLSerializer().serializeToString(copy), width, height };
}

/** About where a text ends; a letter of the lettering face is seldom wider than six tenths of its size. */
function endOf(text: Element): number {
  if ((text.getAttribute("text-anchor") ?? "start") !== "start") return 0;
  return Number(text.getAttribute("x") ?? 0) + 0.6 * 10.5 * text.textContent.length;
}

async function pictureOf(svg: string, width: number, height: number): Promise<Blob | null> {
  const image = new Image();
  // An address that holds the drawing itself: the page's rules allow pictures from here and from such addresses only.
  image.src = `data:image/svg+xml;charset=utf-8,${encodeURIComponent(svg.replace("</title>", `</title><style>${await faces()}</style>`))}`;
  try {
    await image.decode();
  } catch {
    // It cannot draw this; the caller says so.
    return null;
  }
  const canvas = document.createElement("canvas");
  canvas.width = width;
  canvas.height = height;
  canvas.getContext("2d")?.drawImage(image, 0, 0, width, height);
  return new Promise((resolve) => canvas.toBlob(resolve, "image/png"));
}

/** The lettering face, written out: a picture cannot ask for the page's fonts. Those not loaded are not in use. */
async function faces(): Promise<string> {
  const rules = [...document.styleSheets].flatMap((sheet) =>
    [...sheet.cssRules].filter(
      (rule): rule is CSSFontFaceRule =>
        rule instanceof CSSFontFaceRule &&
        rule.style.getPropertyValue("font-family").includes("Commissioner"),
    ),
  );
  const written = await Promise.all(
    rules.map(async (rule) => {
      const [, address = ""] = /url\("?([^")]+)"?\)/.exec(rule.style.getPropertyValue("src")) ?? [];
      const base = rule.parentStyleSheet?.href ?? document.baseURI;
      const answer = await fetch(new URL(address, base));
      if (!answer.ok) return "";
      const bytes = new Uint8Array(await answer.arrayBuffer());
      const data = btoa(Array.from(bytes, (byte) => String.fromCharCode(byte)).join(""));
      return rule.cssText.replace(/url\([^)]*\)/, `url(data:font/woff2;base64,${data})`);
    }),
  );
  return written.join("");
}
