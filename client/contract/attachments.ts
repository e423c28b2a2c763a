/** Files kept as they were read in: what is sent with their bytes, and what comes back. */
import * as z from "zod/mini";

/** The bytes are the body of the request; their name stands in the address. No path, no control characters. */
export const attachmentQuery = z.object({
  name: z.string().check(z.trim(), z.minLength(1), z.maxLength(200), z.regex(/^[^\p{Cc}/\\]*$/u)),
});
export const attachmentParameters = z.object({ id: z.uuid(), attachmentId: z.uuid() });

export interface Attachment {
  readonly id: string;
  readonly name: string;
  readonly size: number;
}
