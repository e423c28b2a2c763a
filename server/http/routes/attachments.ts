/** /api/notebooks/:id/attachments for those who take part, /api/referee/:token/attachments for whoever holds a link. */
import express, { Router, type Request, type RequestHandler } from "express";
import * as z from "zod/mini";
import { ATTACHMENT_CONTENT_TYPE, LARGEST_ATTACHMENT_BYTES } from "#contract/attachment-type.ts";
import { attachmentParameters, attachmentQuery } from "#contract/attachments.ts";
import { fetchAttachment, fetchAttachmentAsReferee, keepAttachment } from "../../commands/attachments.ts";
import { refuse } from "../../commands/outcome.ts";
import type { Services } from "../../services.ts";
import type { RateLimits } from "../rate-limits.ts";
import { forEveryone, inNotebook, present, presentFile } from "../route.ts";

const refereeParameters = z.object({ token: z.string(), attachmentId: z.uuid() });
const readBytes: RequestHandler = express.raw({
  type: ATTACHMENT_CONTENT_TYPE,
  limit: LARGEST_ATTACHMENT_BYTES,
});

/** Only once it is known that the sender may: nobody else makes the server hold ten megabytes. Null when it is no file. */
function bytesOf(request: Request): Promise<Buffer | null> {
  return new Promise((resolve, reject) => {
    const { res: response } = request;
    if (!response) throw new Error("a request has its response");
    readBytes(request, response, (error?: unknown) => {
      if (error instanceof Error) reject(error);
      else resolve(Buffer.isBuffer(request.body) ? request.body : null);
    });
  });
}

export function attachmentRoutes(services: Services, limits: RateLimits): Router {
  const { database } = services;
  const router = Router();

  router.post(
    "/api/notebooks/:id/attachments",
    limits.uploads,
    inNotebook(
      services,
      ["notebook.write"],
      { query: attachmentQuery },
      async ({ person, access, query, request }) => {
        const bytes = await bytesOf(request);
        if (bytes === null)
          return refuse("unsupported-media", `Send the file's bytes as ${ATTACHMENT_CONTENT_TYPE}.`);
        const kept = await keepAttachment(database, access, { personId: person.id, name: query.name, bytes });
        return kept.ok ? present(kept.value, 201) : kept;
      },
    ),
  );

  router.get(
    "/api/notebooks/:id/attachments/:attachmentId",
    inNotebook(
      services,
      ["notebook.read"],
      { parameters: attachmentParameters },
      async ({ access, parameters }) => {
        const file = await fetchAttachment(database, access.notebookId, parameters.attachmentId);
        return file.ok ? presentFile(file.value) : file;
      },
    ),
  );

  router.get(
    "/api/referee/:token/attachments/:attachmentId",
    limits.refereeGuesses,
    forEveryone(services, { parameters: refereeParameters }, async ({ parameters }) => {
      const file = await fetchAttachmentAsReferee(database, parameters.token, parameters.attachmentId);
      return file.ok ? presentFile(file.value) : file;
    }),
  );
  return router;
}
