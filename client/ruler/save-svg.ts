/** The ruler as a picture of its own: colours and faces are written into it, since a file has no style sheet. */
import { download } from "../ui/download.ts";

const carried = [
  "fill",
  "fill-opacity",
  "stroke",
  "stroke-width",
  "stroke-dasharray",
  "font-family",
  "font-size",
  "font-style",
  "font-weight",
  "text-anchor",
  "paint-order",
  "stroke-linejoin",
] as const;

/** `caption` stands below the scale: the values that the sizes belong to. */
export function svgText(drawing: SVGSVGElement, caption: string): string {
  const copy = drawing.cloneNode(true) as SVGSVGElement; // a clone is of the kind it was made from
  const originals = [drawing, ...drawing.querySelectorAll("*")];
  for (const [index, element] of [copy, ...copy.querySelectorAll("*")].entries()) {
    const original = originals[index];
    if (!original) continue;
    const style = getComputedStyle(original);
    for (const name of carried) {
      const value = style.getPropertyValue(name);
      if (value !== "") element.setAttribute(name, value);
    }
    for (const name of ["class", "tabindex", "role", "style"]) element.removeAttribute(name);
  }
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
  copy.setAttribute("xmlns", "http://www.w3.org/2000/svg");
  copy.setAttribute("viewBox", `0 0 ${width} ${height + 22}`);
  copy.setAttribute("width", String(width));
  copy.setAttribute("height", String(height + 22));
  return new XMLSerializer().serializeToString(copy);
}

export function saveSvg(drawing: SVGSVGElement, caption: string, title: string): void {
  download(`${title} - order ruler.svg`, "image/svg+xml", svgText(drawing, caption));
}
