/** A Feynman graph as plain JSON: vertices joined by lines of fields, with external legs and its symmetry factor. */

/** A field whose lines the graphs have. Lines of a field that is not its own conjugate have a direction. */
export interface LineField {
  readonly id: string;
  readonly directed: boolean;
}

/** How many legs of each field, in the order of the fields; `conjugate` stays zero for fields without direction. */
export interface Legs {
  readonly plain: readonly number[];
  readonly conjugate: readonly number[];
}

export interface VertexKind {
  readonly id: string;
  readonly legs: Legs;
  readonly count: number;
}

/** A line, by indices of vertices and of fields. A directed one runs from a ψ̄ of its `from` to a ψ of its `to`. */
export interface GraphEdge {
  readonly from: number;
  readonly to: number;
  readonly field: number;
  /** How many equal lines run here: 3 for the sunset. */
  readonly count: number;
}

/** External legs: a factor of their vertex that no line uses up. A plain leg ψ of a directed field runs inwards. */
export interface GraphLeg {
  readonly vertex: number;
  readonly field: number;
  readonly conjugate: boolean;
  readonly count: number;
  /** With labelled legs: which one, from 0; null when legs of one field are interchangeable. */
  readonly label: number | null;
}

export interface Graph {
  /** Index of the kind of each vertex. */
  readonly vertices: readonly number[];
  readonly edges: readonly GraphEdge[];
  readonly legs: readonly GraphLeg[];
  readonly loops: number;
  /** S with the external legs held fixed: the factor 1/S of the Feynman rules. A whole number, as text. */
  readonly symmetry: string;
  /** In how many different ways the legs can be labelled: channels; "1" when they are labelled already. */
  readonly labellings: string;
}

export interface GraphRequest {
  readonly fields: readonly LineField[];
  readonly vertices: readonly VertexKind[];
  readonly external: Legs;
  /** Only graphs that no cut of a single internal line takes apart. */
  readonly onlyOneParticleIrreducible?: boolean;
  /** Without lines that begin and end at one vertex. */
  readonly dropSelfLoops?: boolean;
  /** Without parts that hang on a single vertex and have no external leg; self-loops are such parts. */
  readonly dropTadpoles?: boolean;
  /** Legs told apart: each channel is then a graph of its own. */
  readonly labelledLegs?: boolean;
  /** At most so many graphs; without it all. */
  readonly most?: number;
  /** At most so many partial graphs looked at: a bound on time that is the same everywhere. */
  readonly mostSteps?: number;
}

export interface GraphList {
  readonly graphs: readonly Graph[];
  /** Whether a limit cut the list short: there are then more graphs than listed. */
  readonly truncated: boolean;
}
