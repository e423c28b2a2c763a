import { dirname, resolve } from "node:path";
import { fileURLToPath } from "node:url";
import eslint from "@eslint/js";
import accessibility from "eslint-plugin-jsx-a11y-x";
import hooks from "eslint-plugin-react-hooks";
import globals from "globals";
import typescript from "typescript-eslint";

const root = resolve(dirname(fileURLToPath(import.meta.url)), "../..");

/** What the parser of mathjs is put together from. Nothing that evaluates is among it. */
const partsOfTheParser = [
  "createFunctionNode",
  "createNode",
  "createOperatorNode",
  "createParenthesisNode",
  "createParse",
  "createSymbolNode",
];

/** The engine has no clock, no unseeded randomness and no way out. */
const impureGlobals = [
  "Date",
  "performance",
  "crypto",
  "fetch",
  "setTimeout",
  "setInterval",
  "window",
  "document",
  "process",
  "console",
];

export default typescript.config(
  { ignores: ["**/dist/**", "**/.data/**", "**/node_modules/**", "test-results/**", "tests/lint/*.cjs"] },
  { linterOptions: { reportUnusedDisableDirectives: "error" } },
  eslint.configs.recommended,
  {
    files: ["**/*.{ts,tsx}"],
    extends: [typescript.configs.strictTypeChecked],
    languageOptions: { parserOptions: { project: [resolve(root, "tsconfig.json")], tsconfigRootDir: root } },
    rules: {
      "@typescript-eslint/restrict-template-expressions": [
        "error",
        { allowNumber: true, allowBoolean: true },
      ],
      "@typescript-eslint/no-confusing-void-expression": "off",
      "@typescript-eslint/consistent-type-imports": "error",
      "@typescript-eslint/no-extraneous-class": "off",
      // A cast needs a reason on its line; `!` is never the reason.
      "@typescript-eslint/no-non-null-assertion": "error",
      "@typescript-eslint/no-unused-vars": ["error", { argsIgnorePattern: "^_", varsIgnorePattern: "^_" }],
      "@typescript-eslint/unbound-method": "off",
      "@typescript-eslint/use-unknown-in-catch-callback-variable": "off",
      "no-empty": ["error", { allowEmptyCatch: false }],
    },
  },
  {
    files: ["client/engine/**/*.ts"],
    rules: {
      "no-restricted-globals": ["error", ...impureGlobals],
      "no-restricted-imports": [
        "error",
        { paths: [{ name: "mathjs/number", allowImportNames: partsOfTheParser }] },
      ],
      "no-restricted-properties": [
        "error",
        { object: "Math", property: "random", message: "The engine is deterministic." },
      ],
    },
  },
  {
    files: ["client/**/*.tsx"],
    plugins: { "react-hooks": hooks, "jsx-a11y-x": accessibility },
    rules: { ...hooks.configs.recommended.rules, ...accessibility.configs.recommended.rules },
  },
  {
    files: ["tests/**", "e2e/**"],
    rules: {
      "@typescript-eslint/no-unsafe-assignment": "off",
      "@typescript-eslint/no-unsafe-member-access": "off",
      "@typescript-eslint/no-unsafe-argument": "off",
      "@typescript-eslint/no-unsafe-call": "off",
      "@typescript-eslint/no-unsafe-return": "off",
      "@typescript-eslint/no-non-null-assertion": "off",
      "@typescript-eslint/require-await": "off",
    },
  },
  { files: ["**/*.{mjs,cjs,js}"], languageOptions: { globals: globals.node } },
);
