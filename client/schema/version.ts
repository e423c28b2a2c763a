/**
 * Version of the shared document's schema. Raised whenever a node, mark or attribute is added or changed:
 * an editor with a lower number would drop what it does not know merely by opening the document.
 */
export const SCHEMA_VERSION = 3;
