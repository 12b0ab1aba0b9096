import nextVitals from "eslint-config-next/core-web-vitals";
import nextTypescript from "eslint-config-next/typescript";

/**
 * The house: which room may import which. `ours` lists rooms (folders under the root, imported by "@/"),
 * `npm` lists packages. Only same-folder ("./") and "@/" imports exist; parent-relative ones are refused.
 * tests/house lints one violating sample per zone and asserts that it is refused.
 */
const floor = ["lib/units", "lib/errors"];
const track = [...floor, "lib/numeric", "lib/stats", "lib/geo", "lib/track"];
const pureLib = [
  ...track,
  "lib/formats",
  "lib/analysis",
  "lib/gear",
  "lib/compare",
  "lib/race",
  "lib/display",
];
const react = ["react", "react-dom", "next/link", "next/navigation", "next/dynamic", "next/image"];
const ui = [...react, "lucide-react", "sonner", "@tanstack/react-query", "zod"];

/** @type {{ room: string, ours: string[], npm: string[] }[]} */
export const zones = [
  { room: "lib/units", ours: [], npm: [] },
  { room: "lib/errors", ours: [], npm: [] },
  { room: "lib/numeric", ours: floor, npm: [] },
  { room: "lib/stats", ours: [...floor, "lib/numeric"], npm: [] },
  { room: "lib/geo", ours: [...floor, "lib/numeric", "lib/stats"], npm: ["geographiclib-geodesic"] },
  { room: "lib/track", ours: track, npm: ["fflate", "@photostructure/tz-lookup"] },
  {
    room: "lib/formats",
    ours: track,
    npm: [
      "saxes",
      "@tmcw/togeojson",
      "@xmldom/xmldom",
      "@garmin/fitsdk",
      "fflate",
      "yauzl",
      "geojson",
      "node:zlib",
      "node:stream",
      "node:buffer",
    ],
  },
  { room: "lib/analysis", ours: [...track], npm: [] },
  { room: "lib/gear", ours: [...floor, "lib/numeric"], npm: ["zod"] },
  { room: "lib/compare", ours: [...floor, "lib/numeric", "lib/stats"], npm: [] },
  { room: "lib/race", ours: [...floor, "lib/numeric", "lib/geo", "lib/track"], npm: [] },
  { room: "lib/display", ours: floor, npm: [] },
  { room: "lib/worker", ours: [...pureLib, "lib/worker"], npm: ["piscina", "node:*"] },
  { room: "lib/server", ours: [...pureLib, "lib/worker", "lib/server", "db"], npm: ["*"] },
  // JSON columns are typed by the science that fills them, and kinds of part are named once, hence track,
  // analysis and gear.
  {
    room: "db",
    ours: [...floor, "lib/track", "lib/analysis", "lib/gear", "db"],
    npm: ["drizzle-orm", "@libsql/client", "uuidv7", "node:*"],
  },
  { room: "components/ui", ours: ["components/ui", "lib/display", ...floor], npm: ui },
  {
    room: "components/chart",
    ours: ["components/ui", "components/chart", ...pureLib],
    npm: [...ui, "uplot"],
  },
  {
    room: "components/map",
    ours: ["components/ui", "components/map", ...pureLib],
    npm: [...ui, "maplibre-gl", "react-map-gl", "pmtiles"],
  },
  { room: "components/drawing", ours: ["components/ui", "components/drawing", ...pureLib], npm: ui },
  { room: "components", ours: ["components", ...pureLib], npm: ui },
  {
    room: "app",
    ours: ["app", "components", "lib/server", ...pureLib],
    npm: [...ui, "next", "next/*"],
  },
];

const escape = (text) => text.replace(/[.*+?^${}()|[\]\\]/g, "\\$&");

/** One regular expression that matches every import a zone may not make. */
export function refusal({ room, ours, npm }) {
  const zone = { ours: ours.includes(room) ? ours : [...ours, room], npm };
  if (zone.npm.includes("*")) {
    const ours = zone.ours.map((room) => `@/${escape(room)}/`).join("|");
    return `^(\\.\\./|@/(?!${ours.replaceAll("@/", "")}))`;
  }
  const packages = zone.npm.map((name) =>
    name.endsWith("*") ? escape(name.slice(0, -1)) : `${escape(name)}(/.*)?$`,
  );
  const allowed = ["\\./", ...zone.ours.map((room) => `@/${escape(room)}/`), ...packages];
  return `^(?!(${allowed.join("|")}))`;
}

const zoneConfigs = [...zones]
  .sort((a, b) => a.room.length - b.room.length)
  .map((zone) => ({
    files: [`${zone.room}/**/*.{ts,tsx}`],
    ignores: ["**/*.test.{ts,tsx}"],
    rules: {
      "no-restricted-imports": [
        "error",
        {
          patterns: [
            {
              regex: refusal(zone),
              message: `${zone.room} may not import this: see the zone table in eslint.config.mjs.`,
            },
          ],
        },
      ],
    },
  }));

const pureGlobals = [
  "process",
  "fetch",
  "console",
  "window",
  "document",
  "localStorage",
  "navigator",
  "setTimeout",
  "setInterval",
];

const config = [
  {
    ignores: [
      ".next/**",
      "build/**",
      "data/**",
      "drizzle/**",
      "node_modules/**",
      "next-env.d.ts",
      "public/**",
      "test-results/**",
      "playwright-report/**",
    ],
  },
  ...nextVitals,
  ...nextTypescript,
  {
    files: ["**/*.{ts,tsx}"],
    rules: {
      "@typescript-eslint/no-explicit-any": "error",
      "@typescript-eslint/no-non-null-assertion": "error",
      "@typescript-eslint/consistent-type-imports": "error",
      "@typescript-eslint/no-unused-vars": ["error", { argsIgnorePattern: "^_", varsIgnorePattern: "^_" }],
      "no-restricted-syntax": [
        "error",
        {
          selector: "MemberExpression[object.name='process'][property.name='env']",
          message: "Only lib/server/env reads process.env.",
        },
        {
          selector: "CallExpression[callee.property.name='transaction'][callee.object.name='db']",
          message: "Writes go through enqueueWrite in db/client.ts; see DEVELOPERS.md.",
        },
      ],
    },
  },
  ...zoneConfigs,
  {
    files: pureLib.map((room) => `${room}/**/*.ts`),
    ignores: ["**/*.test.ts"],
    rules: {
      "no-restricted-globals": ["error", ...pureGlobals],
      "no-restricted-properties": [
        "error",
        { object: "Math", property: "random", message: "Randomness comes in as an argument (rng)." },
        { object: "Date", property: "now", message: "The clock comes in as an argument." },
      ],
      "no-restricted-syntax": [
        "error",
        {
          selector: "NewExpression[callee.name='Date'][arguments.length=0]",
          message: "The clock comes in as an argument.",
        },
      ],
      "max-lines": ["error", { max: 400 }],
      "max-lines-per-function": ["error", { max: 70, skipBlankLines: true, skipComments: true }],
      "max-params": ["error", 4],
    },
  },
  {
    files: ["app/**/*.{ts,tsx}", "components/**/*.{ts,tsx}", "lib/server/**/*.ts", "db/**/*.ts"],
    ignores: ["**/*.test.{ts,tsx}"],
    rules: {
      "max-lines": ["error", { max: 400 }],
      "max-lines-per-function": ["error", { max: 120, skipBlankLines: true, skipComments: true }],
    },
  },
  {
    files: ["app/**/page.tsx"],
    rules: { "max-lines": ["error", { max: 60 }] },
  },
  {
    files: [
      "lib/server/env/**",
      "scripts/**",
      "tests/**",
      "*.config.ts",
      "instrumentation.ts",
      "lib/worker/**",
    ],
    rules: { "no-restricted-syntax": "off" },
  },
];

export default config;
