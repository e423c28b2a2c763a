/** The ruler as a picture of its own. */
import { download } from "../ui/download.ts";
import { standAlone } from "../ui/svg-file.ts";

/** `caption` stands below the scale: the values that the sizes belong to. */
export function svgText(drawing: SVGSVGElement, caption: string): string {
  const copy = standAlone(drawing);
  for (const hand of copy.querySelectorAll("[data-hand]")) hand.remove();
  const { width, height } = drawing.viewBox.baseVal;
  const text = document.createElementNS("http://www.w3.org/2000/svg", "text");
  text.setAttribute("x", "24");
  text.setAttribute("y", String(height + 14));
  text.setAttribute("font-family", "Commissioner, sans-serif");
  text.setAttribute("font-size", "12");
  text.setAttribute("fill", getComputedStyle(drawing).color);
  text.textContent = caption;
  copy.append(text);
  copy.setAttribute("viewBox", `0 0 ${width} ${height + 22}`);
  copy.setAttribute("width", String(width));
  copy.setAttribute("height", String(height + 22));
  return new XMLSerializer().serializeToString(copy);
}

export function saveSvg(drawing: SVGSVGElement, caption: string, title: string): void {
  download(`${title} - order ruler.svg`, "image/svg+xml", svgText(drawing, caption));
}
