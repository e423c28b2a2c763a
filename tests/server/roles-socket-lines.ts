/** What may be done over the socket, also by who writes frames by hand. */
import * as decoding from "lib0/decoding";
import * as encoding from "lib0/encoding";
import { Awareness, encodeAwarenessUpdate } from "y-protocols/awareness";
import * as Y from "yjs";
import { FRAGMENT, messageType } from "#contract/collab.ts";
import { eventually } from "./http-world.ts";
import { HandSocket, syncType } from "./roles-socket.ts";
import { verdicts, type Actor, type Line, type Scene, type Verdict } from "./roles-scene.ts";

const emptyStateVector = Y.encodeStateVector(new Y.Doc());

function aSentence(): Uint8Array {
  const document = new Y.Doc();
  const paragraph = new Y.XmlElement("paragraph");
  paragraph.insert(0, [new Y.XmlText("written by hand")]);
  document.getXmlFragment(FRAGMENT).insert(0, [paragraph]);
  return Y.encodeStateAsUpdate(document);
}

/** A presence frame of a page that was never opened, and the client id it names. */
function presenceFrame(name: string): { clientId: number; states: Uint8Array } {
  const document = new Y.Doc();
  const awareness = new Awareness(document);
  awareness.setLocalState({ user: { name } });
  const states = encodeAwarenessUpdate(awareness, [document.clientID]);
  awareness.destroy();
  return { clientId: document.clientID, states };
}

function clientIdsIn(decoder: decoding.Decoder): number[] {
  const inner = decoding.createDecoder(decoding.readVarUint8Array(decoder));
  const count = decoding.readVarUint(inner);
  return Array.from({ length: count }, () => {
    const clientId = decoding.readVarUint(inner);
    decoding.readVarUint(inner);
    decoding.readVarString(inner);
    return clientId;
  });
}

/** Opens, does, closes; a refused upgrade is the verdict. */
async function onSocket(
  actor: Actor,
  scene: Scene,
  act: (socket: HandSocket) => Promise<Verdict>,
): Promise<Verdict> {
  const socket = await HandSocket.open(actor, scene);
  if (!(socket instanceof HandSocket)) return socket;
  try {
    return await act(socket);
  } finally {
    await socket.close();
  }
}

async function readDocument(socket: HandSocket): Promise<Verdict> {
  socket.sendSync(syncType.step1, emptyStateVector);
  await eventually(() => socket.step2());
  return "done";
}

const write = (type: number) => (actor: Actor, scene: Scene) =>
  onSocket(actor, scene, async (socket) => {
    await readDocument(socket);
    socket.sendSync(type, aSentence());
    return eventually<Verdict>(() => {
      if (socket.savedCount() > 0) return "done";
      return socket.notices().some(({ about }) => about === "rejected") ? "read-only" : null;
    });
  });

async function showPresence(socket: HandSocket, name: string): Promise<number> {
  const { clientId, states } = presenceFrame(name);
  socket.send(messageType.awareness, (encoder) => encoding.writeVarUint8Array(encoder, states));
  // Frames are taken in order: once the document is here, the presence was dealt with.
  await readDocument(socket);
  return clientId;
}

/** Two more pages of the owner: one is seen for certain, and the other then asks who is there. */
const sendPresence = (owner: Actor["browser"]) => (actor: Actor, scene: Scene) =>
  onSocket(actor, scene, async (socket) => {
    const clientId = await showPresence(socket, "by hand");
    const asOwner: Actor = { who: "owner", browser: owner, token: "" };
    return onSocket(asOwner, scene, async (beacon) => {
      const beaconId = await showPresence(beacon, "beacon");
      return onSocket(asOwner, scene, async (witness) => {
        witness.send(messageType.queryAwareness, () => undefined);
        const present = await eventually(() => {
          const ids = witness.received(messageType.awareness).flatMap(clientIdsIn);
          return ids.includes(beaconId) ? ids : null;
        });
        return present.includes(clientId) ? "done" : "read-only";
      });
    });
  });

const links = { "referee link": "done", "revoked link": "forbidden" } as const;
const readers = verdicts(["done", "done", "done", "done"], links);
const writers = verdicts(["done", "done", "read-only", "read-only"], {
  ...links,
  "referee link": "read-only",
});

export function socketLines(owner: () => Actor["browser"]): readonly Line[] {
  return [
    {
      action: "read the document over a socket",
      changes: false,
      verdicts: readers,
      attempt: (actor, scene) => onSocket(actor, scene, readDocument),
    },
    { action: "write by an update", changes: true, verdicts: writers, attempt: write(syncType.update) },
    { action: "write by sync step 2", changes: true, verdicts: writers, attempt: write(syncType.step2) },
    {
      action: "be seen by the others",
      changes: false,
      verdicts: writers,
      attempt: (actor, scene) => sendPresence(owner())(actor, scene),
    },
  ];
}
