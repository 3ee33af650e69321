// Style is prettier's business; this finds mistakes. Who may import whom is test/house/imports.test.ts.
import tseslint from "typescript-eslint";

export default tseslint.config(
  { ignores: ["dist/**", ".cache/**", "node_modules/**", "**/*.mjs", "**/*.js"] },
  ...tseslint.configs.strict,
  {
    files: ["src/**/*.ts", "webview/**/*.ts", "test/**/*.ts"],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: `${import.meta.dirname}/..` } },
    rules: {
      "@typescript-eslint/no-non-null-assertion": "off", // typed arrays and checked maps
      "@typescript-eslint/no-floating-promises": "error",
      "@typescript-eslint/no-misused-promises": ["error", { checksVoidReturn: { arguments: false, attributes: false } }],
      "@typescript-eslint/switch-exhaustiveness-check": "error",
      "@typescript-eslint/consistent-type-imports": "error",
      eqeqeq: "error",
      "no-console": "off",
    },
  },
  {
    files: ["src/engine/**/*.ts", "src/report/**/*.ts", "src/plan/**/*.ts", "webview/**/*.ts"],
    rules: { "no-console": "error" },
  },
);
