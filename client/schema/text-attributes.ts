/**
 * Attributes of our own nodes: text with a default, carried in HTML as one JSON object. HTML attribute names are
 * case-insensitive, and a field "d" beside a field "D" would fall together if each had an HTML attribute.
 */
import type { Attributes } from "@tiptap/core";

const carrier = "data-attributes";

function readCarrier(element: HTMLElement): Readonly<Record<string, unknown>> {
  try {
    const value: unknown = JSON.parse(element.getAttribute(carrier) ?? "{}");
    // Narrowed on the same line: a plain object, whose members are looked at one by one below.
    return typeof value === "object" && value !== null ? (value as Record<string, unknown>) : {};
  } catch (error) {
    // Pasted HTML may hold anything; what is not JSON carries no attributes.
    if (error instanceof SyntaxError) return {};
    throw error;
  }
}

/** Node attributes from names and initial texts. */
export function textAttributes(initial: Readonly<Record<string, string>>): Attributes {
  return Object.fromEntries(
    Object.entries(initial).map(([name, text]) => [
      name,
      {
        default: text,
        rendered: false,
        parseHTML: (element: HTMLElement) => {
          const value = readCarrier(element)[name];
          return typeof value === "string" ? value : text;
        },
      },
    ]),
  );
}

/** The HTML attributes that `textAttributes` reads back. */
export function carried(attributes: Readonly<Record<string, unknown>>): Readonly<Record<string, string>> {
  return { [carrier]: JSON.stringify(attributes) };
}
