/** Of files that are kept as they were read in. */
export const LARGEST_ATTACHMENT_BYTES = 10_000_000;
export const ATTACHMENT_CONTENT_TYPE = "application/octet-stream";
