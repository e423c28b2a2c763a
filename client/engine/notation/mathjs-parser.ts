/**
 * The parser of mathjs, put together from its factories with four kinds of nodes: whatever
 * else its language has (assignments, indices, ranges, texts, objects, units) cannot even be built. It never evaluates.
 */
import {
  createFunctionNode,
  createNode,
  createOperatorNode,
  createParenthesisNode,
  createParse,
  createSymbolNode,
} from "mathjs/number";

export type ParsedNode =
  | { readonly type: "SymbolNode"; readonly name: string }
  | {
      readonly type: "FunctionNode";
      readonly fn: { readonly name: string };
      readonly args: readonly ParsedNode[];
    }
  | { readonly type: "OperatorNode"; readonly op: string; readonly args: readonly ParsedNode[] }
  | { readonly type: "ParenthesisNode"; readonly content: ParsedNode };

declare module "mathjs/number" {
  // What mathjs 15 exports and its own types leave out, as far as it is used here.
  type NodeClass = new (...fields: never[]) => object;
  export function createNode(scope: { readonly mathWithTransform: object }): NodeClass;
  export function createOperatorNode(scope: { readonly Node: NodeClass }): NodeClass;
  export function createParenthesisNode(scope: { readonly Node: NodeClass }): NodeClass;
  export function createSymbolNode(scope: { readonly Node: NodeClass; readonly math: object }): NodeClass;
  export function createFunctionNode(scope: {
    readonly Node: NodeClass;
    readonly SymbolNode: NodeClass;
    readonly math: object;
  }): NodeClass;
  export function createParse(scope: Readonly<Record<string, unknown>>): (text: string) => ParsedNode;
}

class Refused {
  constructor() {
    throw new Error("mathjs met something outside the explicit notation.");
  }
}
const nothing = {};
/** Stands in for mathjs's choice by types of arguments: its parser also takes lists, and here only ever one text. */
const onlyText = Object.assign((_name: string, by: { readonly string: unknown }) => by.string, {
  addConversion: () => undefined,
});
const Node = createNode({ mathWithTransform: nothing });
const SymbolNode = createSymbolNode({ Node, math: nothing });
const parseWithMathjs = createParse({
  typed: onlyText,
  config: nothing,
  SymbolNode,
  OperatorNode: createOperatorNode({ Node }),
  ParenthesisNode: createParenthesisNode({ Node }),
  FunctionNode: createFunctionNode({ Node, SymbolNode, math: nothing }),
  numeric: () => new Refused(),
  AccessorNode: Refused,
  ArrayNode: Refused,
  AssignmentNode: Refused,
  BlockNode: Refused,
  ConditionalNode: Refused,
  ConstantNode: Refused,
  FunctionAssignmentNode: Refused,
  IndexNode: Refused,
  ObjectNode: Refused,
  RangeNode: Refused,
  RelationalNode: Refused,
});

const explicit = /^(?:[xf]\d+|[o()+\-*/^!,])+$/;

/**
 * Groups an explicit text: `*` and `/` from the left, above them `^`, below them `+` and `-`.
 * Throws when the text is not explicit, which is a mistake of ours and never of the typist.
 */
export function group(text: string): ParsedNode {
  if (!explicit.test(text)) throw new Error("Only explicit notation may reach mathjs.");
  return parseWithMathjs(text);
}
