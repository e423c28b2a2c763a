/** The documents that a new notebook can begin with. */
import type { Template } from "#contract/templates.ts";
import type { DocumentNode } from "./document-builder.ts";
import { lanternBlocks, lanternDocument } from "./lantern-notebook.ts";
import type { PinMaker } from "./pin-maker.ts";
import { countBlocks, countDocument } from "./templates-count.ts";
import { contactBlocks, contactDocument } from "./templates-contact.ts";
import { gravityBlocks, gravityDocument } from "./templates-gravity.ts";
import { lifshitzBlocks, lifshitzDocument } from "./templates-lifshitz.ts";
import {
  boundStateBlocks,
  boundStateDocument,
  unnaturalBlocks,
  unnaturalDocument,
} from "./templates-nonrelativistic.ts";
import { nucleonBlocks, nucleonDocument } from "./templates-nucleons.ts";
import { scalarBlocks, scalarDocument } from "./templates-scalar.ts";
import { ternBlocks, ternDocument } from "./tern-notebook.ts";

export interface WrittenTemplate {
  readonly blocks: readonly DocumentNode[];
  readonly write: (pin: PinMaker) => DocumentNode;
}

const documents: Readonly<Record<Exclude<Template, "blank">, WrittenTemplate>> = {
  lantern: { blocks: lanternBlocks, write: lanternDocument },
  tern: { blocks: ternBlocks, write: ternDocument },
  "scalar-pair": { blocks: scalarBlocks, write: scalarDocument },
  "contact-gauge": { blocks: contactBlocks, write: contactDocument },
  lifshitz: { blocks: lifshitzBlocks, write: lifshitzDocument },
  nucleons: { blocks: nucleonBlocks, write: nucleonDocument },
  "bound-state": { blocks: boundStateBlocks, write: boundStateDocument },
  "large-scattering-length": { blocks: unnaturalBlocks, write: unnaturalDocument },
  gravity: { blocks: gravityBlocks, write: gravityDocument },
  "standard-model-count": { blocks: countBlocks, write: countDocument },
};

export function documentOf(template: Exclude<Template, "blank">): WrittenTemplate {
  return documents[template];
}
