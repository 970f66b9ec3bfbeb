import { defineConfig, globalIgnores } from "eslint/config";
import tseslint from "typescript-eslint";
import nextVitals from "eslint-config-next/core-web-vitals";
import importX from "eslint-plugin-import-x";
import checkFile from "eslint-plugin-check-file";
import { createTypeScriptImportResolver } from "eslint-import-resolver-typescript";

const ENV = {
  selector: "MemberExpression[object.name='process'][property.name='env']",
  message: "Read lib/env.ts instead.",
};
const USE_SERVER = {
  selector: "Program > ExpressionStatement[directive='use server']",
  message: "Only app/**/actions.ts may carry 'use server'.",
};
const USE_SERVER_INLINE = {
  selector: "BlockStatement > ExpressionStatement[directive='use server']",
  message: "No inline server actions.",
};
const USE_CLIENT_ROUTE = {
  selector: "Program > ExpressionStatement[directive='use client']",
  message: "Pages and layouts stay server components; push the client part down.",
};
const NAKED_ACTION = {
  selector: [
    "ExportNamedDeclaration > FunctionDeclaration",
    "ExportDefaultDeclaration",
    "ExportAllDeclaration[exportKind='value']",
    "ExportNamedDeclaration[exportKind='value'] > ExportSpecifier[exportKind='value']",
    "ExportNamedDeclaration > VariableDeclaration > VariableDeclarator:not([init.type='CallExpression'][init.callee.name=/^define(Public)?Action$/])",
  ].join(", "),
  message: "Every exported action is built by defineAction() or definePublicAction().",
};
const BARE_WRITE = {
  selector: [
    "AwaitExpression > CallExpression[callee.property.name='delete'][callee.object.name=/^(db|tx)$/]",
    "AwaitExpression > CallExpression[callee.property.name='set'][callee.object.callee.property.name='update'][callee.object.callee.object.name=/^(db|tx)$/]",
  ].join(", "),
  message: "An update or delete needs a where clause.",
};
const restrict = (...list) => ({ "no-restricted-syntax": ["error", ...list] });

/** Files with the room of a page each: a longer one holds more than one thing. */
const MAX_LINES = 500;
const nodeGlobals = Object.fromEntries(
  [
    "process",
    "console",
    "Buffer",
    "URL",
    "fetch",
    "performance",
    "AbortSignal",
    "setTimeout",
    "clearTimeout",
  ].map((name) => [name, "readonly"]),
);

export default defineConfig([
  globalIgnores([
    ".next/**",
    ".run/**",
    "node_modules/**",
    "next-env.d.ts",
    "public/**",
    "db/migrations/**",
    "tests/fixtures/**",
  ]),
  ...nextVitals,
  // Its own detection of React's version asks ESLint for a function that version 10 no longer has.
  { settings: { react: { version: "19.3" } } },
  { files: ["*.config.*"], rules: { "import/no-anonymous-default-export": "off" } },
  {
    rules: {
      "max-lines": ["error", { max: MAX_LINES }],
      "no-warning-comments": [
        "error",
        { terms: ["todo", "fixme", "xxx", "hack"], location: "start" },
      ],
    },
  },
  {
    files: ["**/*.{mjs,cjs}"],
    languageOptions: { globals: nodeGlobals },
    rules: { "no-undef": "error", "no-unused-vars": "error" },
  },
  {
    files: ["**/*.{ts,tsx}"],
    extends: [tseslint.configs.strictTypeChecked],
    languageOptions: {
      parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname },
    },
  },
  {
    files: ["**/*.{ts,tsx}"],
    plugins: { "import-x": importX, "check-file": checkFile },
    settings: { "import-x/resolver-next": [createTypeScriptImportResolver()] },
    rules: {
      ...restrict(ENV, USE_SERVER, USE_SERVER_INLINE),
      "@typescript-eslint/consistent-type-imports": "error",
      "@typescript-eslint/switch-exhaustiveness-check": "error",
      "@typescript-eslint/no-unused-vars": [
        "error",
        { argsIgnorePattern: "^_", varsIgnorePattern: "^_", ignoreRestSiblings: true },
      ],
      "@typescript-eslint/restrict-template-expressions": ["error", { allowNumber: true }],
      // `onClick={() => setOpen(true)}` and `onSubmit={async …}` are how React is written.
      "@typescript-eslint/no-confusing-void-expression": ["error", { ignoreArrowShorthand: true }],
      "@typescript-eslint/no-misused-promises": [
        "error",
        { checksVoidReturn: { attributes: false } },
      ],
      "check-file/filename-naming-convention": [
        "error",
        { "**/*.{ts,tsx}": "KEBAB_CASE" },
        { ignoreMiddleExtensions: true },
      ],
      "import-x/no-restricted-paths": [
        "error",
        {
          zones: [
            { target: "./app", from: "./db", message: "Go through lib/data." },
            {
              target: "./components",
              from: ["./app", "./db"],
              message: "Components take data and actions as props.",
            },
            { target: "./lib", from: ["./app", "./components"], message: "lib is below the UI." },
            {
              target: ["./lib/music", "./lib/schedule"],
              from: "./lib",
              except: ["./music", "./schedule"],
              message: "lib/music and lib/schedule import nothing but each other.",
            },
            {
              target: [
                "./lib/music",
                "./lib/schedule",
                "./lib/schemas",
                "./lib/formats",
                "./lib/services",
                "./lib/client",
              ],
              from: "./db",
              message: "Only lib/data and lib/auth reach the database.",
            },
            { target: "./db", from: ["./app", "./components"], message: "db is below the UI." },
            {
              // The demo season under db/seed may use the readers of files and the data layer.
              target: ["./db/*.ts", "./db/schema/**/*.ts"],
              from: "./lib",
              except: ["./music", "./schedule", "./permissions", "./env.ts"],
              message: "db may see the pure folders and lib/env only.",
            },
          ],
        },
      ],
    },
  },
  {
    files: ["components/**"],
    rules: {
      "@typescript-eslint/no-restricted-imports": [
        "error",
        {
          patterns: [
            {
              group: ["@/lib/data/*", "@/lib/auth/*", "@/db", "@/db/*"],
              allowTypeImports: true,
              message: "Types only.",
            },
          ],
        },
      ],
    },
  },
  {
    files: ["lib/music/**", "lib/schedule/**"],
    rules: {
      "@typescript-eslint/no-restricted-imports": [
        "error",
        {
          patterns: [
            {
              group: [
                "next",
                "next/*",
                "react",
                "react-dom",
                "drizzle-orm",
                "drizzle-orm/*",
                "zod",
                "server-only",
                "node:*",
              ],
              message: "lib/music and lib/schedule are pure.",
            },
          ],
        },
      ],
    },
  },
  { files: ["app/**/actions.ts"], rules: restrict(ENV, USE_SERVER_INLINE, NAKED_ACTION) },
  {
    files: ["app/**/{page,layout,template,default}.tsx"],
    rules: restrict(ENV, USE_SERVER, USE_SERVER_INLINE, USE_CLIENT_ROUTE),
  },
  {
    files: ["lib/data/**", "lib/auth/**"],
    rules: restrict(ENV, USE_SERVER, USE_SERVER_INLINE, BARE_WRITE),
  },
  {
    // The commands, and what Next.js or the tools read before lib/env.ts can be.
    files: ["lib/env.ts", "*.ts", "scripts/**", "db/migrate.ts", "db/seed/index.ts"],
    rules: restrict(USE_SERVER, USE_SERVER_INLINE),
  },
  {
    files: ["tests/**"],
    rules: {
      ...restrict(USE_SERVER),
      // `importOriginal<typeof import("…")>()` is how a mock keeps the rest of a module.
      "@typescript-eslint/consistent-type-imports": ["error", { disallowTypeAnnotations: false }],
      "@typescript-eslint/no-unsafe-argument": "off",
      "@typescript-eslint/no-unsafe-assignment": "off",
      "@typescript-eslint/no-unsafe-call": "off",
      "@typescript-eslint/no-unsafe-member-access": "off",
      "@typescript-eslint/no-unsafe-return": "off",
      "@typescript-eslint/no-non-null-assertion": "off",
      "@typescript-eslint/no-unnecessary-condition": "off",
      "@typescript-eslint/require-await": "off",
      "@typescript-eslint/unbound-method": "off",
    },
  },
]);
