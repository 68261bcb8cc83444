import { defineConfig, globalIgnores } from "eslint/config";
import nextVitals from "eslint-config-next/core-web-vitals";
import nextTs from "eslint-config-next/typescript";
import prettier from "eslint-config-prettier/flat";

/** Forbids imports of the named folders or packages, by alias and by relative path. */
const keepOut = (message, folders, packages = []) => ({
  "no-restricted-imports": [
    "error",
    {
      patterns: [
        {
          group: folders.flatMap((folder) => [`@/${folder}/**`, `@/${folder}`, `**/${folder}/**`]),
          message,
          allowTypeImports: true,
        },
        { group: packages.flatMap((name) => [name, `${name}/**`]), message },
      ].filter((pattern) => pattern.group.length > 0),
    },
  ],
});

const envReader = {
  selector: "MemberExpression[object.name='process'][property.name='env']",
  message: "lib/env.ts is the one reader of process.env.",
};

const ui = [
  "react",
  "react-dom",
  "next",
  "swr",
  "@xyflow/react",
  "comlink",
  "drizzle-orm",
  "@electric-sql/pglite",
  "better-auth",
];
const core = ["random", "statistics", "line", "simulation", "sizing", "records"].map((name) => `lib/${name}/**/*.ts`);

export default defineConfig([
  ...nextVitals,
  ...nextTs,
  prettier,
  globalIgnores([
    ".next/**",
    ".data/**",
    ".scratch*/**",
    "coverage/**",
    "db/migrations/**",
    "test-results/**",
    "next-env.d.ts",
  ]),
  {
    rules: {
      "@typescript-eslint/no-unused-vars": [
        "error",
        { argsIgnorePattern: "^_", varsIgnorePattern: "^_", caughtErrors: "all" },
      ],
    },
  },
  {
    files: core,
    rules: keepOut(
      "The core is pure: take what you need as an argument.",
      ["app", "components", "db", "workers", "lib/client", "lib/auth", "lib/schema", "lib/env"],
      ui,
    ),
  },
  {
    files: ["lib/random/**/*.ts", "lib/simulation/**/*.ts"],
    rules: {
      "no-restricted-properties": [
        "error",
        ...["log", "log2", "log10", "log1p", "exp", "expm1", "pow", "sin", "cos", "tan", "atan", "cbrt", "random"].map(
          (property) => ({
            object: "Math",
            property,
            message: "Draws must be the same bits in every browser: use only arithmetic that IEEE 754 fixes.",
          }),
        ),
      ],
      "no-restricted-syntax": [
        "error",
        envReader,
        {
          selector: "BinaryExpression[operator='**']:not([left.value=2][right.type='Literal'])",
          message: "Powers may differ between browsers; of 2 only, with a written exponent, are they exact.",
        },
        { selector: "NewExpression[callee.name='Date']", message: "Time is an argument." },
        { selector: "ImportDeclaration[source.value='jstat']", message: "jstat is for lib/statistics only." },
      ],
    },
  },
  {
    files: ["lib/format/**/*.ts"],
    rules: keepOut(
      "Formatting imports nothing but types.",
      ["app", "components", "db", "workers", "lib/client", "lib/auth"],
      ui,
    ),
  },
  {
    files: ["workers/**/*.ts", "lib/client/**/*.{ts,tsx}"],
    rules: keepOut("The browser side reaches the server through routes and actions.", ["db", "lib/auth", "lib/env"]),
  },
  {
    files: ["components/**/*.{ts,tsx}"],
    rules: keepOut("Components get data and actions as props or through lib/client.", ["db", "lib/auth", "lib/env"]),
  },
  {
    files: ["db/**/*.ts"],
    rules: keepOut("Queries know nothing of pages.", ["app", "components", "workers", "lib/client", "lib/auth"]),
  },
  {
    files: ["**/*.{ts,tsx}"],
    ignores: [
      "lib/env.ts",
      "*.config.ts",
      "tests/**",
      "instrumentation.ts",
      "proxy.ts",
      "lib/random/**",
      "lib/simulation/**",
    ],
    rules: { "no-restricted-syntax": ["error", envReader] },
  },
]);
