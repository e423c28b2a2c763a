/** A drawing of the page as one that stands alone: colours and faces are written into it, since a file has no style sheet. */

const carried = [
  "fill",
  "fill-opacity",
  "opacity",
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

/** A copy with what the page's style sheets say of each of its parts. */
export function standAlone(drawing: SVGSVGElement): SVGSVGElement {
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
    for (const name of ["class", "tabindex", "role", "style", "aria-hidden"]) element.removeAttribute(name);
  }
  copy.setAttribute("xmlns", "http://www.w3.org/2000/svg");
  return copy;
}
