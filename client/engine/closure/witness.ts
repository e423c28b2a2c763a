/** A one-particle irreducible graph of given insertions and legs: without one, nothing is demanded. */
import { closingSplits } from "../divergence/graph-existence.ts";
import { conjugated, type HalfEdges } from "../divergence/half-edges.ts";
import { vanishesInVacuum } from "../divergence/retarded.ts";
import type { GraphPictures } from "../divergence/value.ts";
import { enumerateGraphs } from "../graphs/enumerate.ts";
import type { Graph, GraphRequest } from "../graphs/graph.ts";
import { canDiverge } from "./diverging.ts";
import type { Frame, Insertion } from "./frame.ts";
import type { InsertionSet } from "./insertion-sets.ts";

/** Partial graphs looked at before a search is given up: where a graph exists, one is found within dozens. */
const MOST_STEPS = 2_000;
/** Graphs looked at where the first one cannot diverge by itself. */
const MOST_GRAPHS = 60;

export interface Witness {
  readonly graph: Graph;
  readonly kinds: GraphPictures["kinds"];
}
/** "undecided": the search was given up. */
export type Found = Witness | "none" | "undecided";

/** Looks for graphs of one set with given legs, each sort at most once. */
export class WitnessSearch {
  private isVanishing: boolean | null = null;
  private seeing: Found | null = null;
  private any: Found | null = null;

  constructor(
    private readonly set: InsertionSet,
    private readonly legs: HalfEdges,
    private readonly loops: number,
    /** Whether each part of a graph whose loops are its own must have an even number of them. */
    private readonly evenLoops: boolean,
    private readonly frame: Frame,
  ) {}

  /**
   * @param needsMomentum whether external momenta must run through every loop: a part of the graph that hangs on one
   *   vertex and has no leg gives masses only
   */
  find(needsMomentum: boolean): Found {
    this.isVanishing ??= vanishesInVacuum(
      this.set.parts.map(({ insertion }) => insertion),
      this.legs,
      this.frame.theory,
    );
    if (this.isVanishing) return "none";
    this.seeing ??= this.set.vertices === 1 ? "none" : this.search(true);
    if (needsMomentum || this.seeing !== "none") return this.seeing;
    // One loop through two or more vertices is a ring, in which nothing hangs on one vertex.
    this.any ??= this.loops === 1 && this.set.vertices > 1 ? "none" : this.search(false);
    return this.any;
  }

  private search(needsMomentum: boolean): Found {
    const { theory } = this.frame;
    const parts = this.set.parts.map(({ insertion, count }) => ({ edges: insertion.edges, count }));
    let undecided = false;
    for (const split of closingSplits(parts, this.legs, theory)) {
      const kinds = kindsOf(this.set, split, this.frame);
      const request: GraphRequest = {
        fields: theory.fields.map(({ symbol, selfConjugate }) => ({ id: symbol, directed: !selfConjugate })),
        vertices: kinds.map(({ insertion, edges, count }) => ({ id: insertion.key, legs: edges, count })),
        external: this.legs,
        onlyOneParticleIrreducible: true,
        dropSelfLoops: needsMomentum,
        dropTadpoles: needsMomentum,
        mostSteps: MOST_STEPS,
      };
      const derivatives = kinds.map(({ insertion }) => insertion.derivatives);
      const diverges = (graph: Graph) => canDiverge(graph, derivatives, this.evenLoops, this.frame);
      let { graphs, truncated } = enumerateGraphs({ ...request, most: 1 });
      let graph = graphs.find(diverges);
      if (!graph && truncated) {
        ({ graphs, truncated } = enumerateGraphs({ ...request, most: MOST_GRAPHS }));
        graph = graphs.find(diverges);
      }
      if (graph)
        return {
          graph,
          kinds: kinds.map(({ insertion, mirrored }) => ({
            termRowId: insertion.termRowId ?? "",
            latex: mirrored ? `\\bigl(${insertion.latex}\\bigr)^\\dagger` : insertion.latex,
            mark: insertion.mark,
          })),
        };
      undecided ||= truncated;
    }
    return undecided ? "undecided" : "none";
  }
}

interface Kind {
  readonly insertion: Insertion;
  readonly edges: HalfEdges;
  readonly count: number;
  readonly mirrored: boolean;
}

/** A term stands for itself and its Hermitian conjugate: so many of each as the split says. */
function kindsOf({ parts }: InsertionSet, split: readonly number[], { theory }: Frame): Kind[] {
  return parts
    .flatMap(({ insertion, count }, index): Kind[] => {
      const { edges, hasMirror } = insertion;
      if (!hasMirror) return [{ insertion, edges, count, mirrored: false }];
      const plain = split[index] ?? count;
      return [
        { insertion, edges, count: plain, mirrored: false },
        { insertion, edges: conjugated(edges, theory), count: count - plain, mirrored: true },
      ];
    })
    .filter(({ count }) => count > 0);
}
