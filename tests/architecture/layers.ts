/**
 * Which part of the house may import which. Data, not code: the test beside it reads it.
 * A layer is found by the longest path that fits; a name may hold `*` for one folder (components/<feature>).
 */
export interface Layer {
  name: string;
  /** Folders (ending in /) and files. */
  paths: string[];
  /** Names of layers that it may import beside itself. */
  mayImport: string[];
}

const domainOrder = [
  "accounts",
  "designs",
  "seasons",
  "bench",
  "results",
  "baselines",
  "scoring",
  "study",
  "corrections",
] as const;

/** Files of lib/domain itself (refusals, ids) belong to no folder and may be used by all of them. */
const domainRoot: Layer = { name: "domain", paths: ["lib/domain/"], mayImport: ["science"] };

const domainFolders: Layer[] = domainOrder.map((folder, n) => ({
  name: `domain/${folder}`,
  paths: [`lib/domain/${folder}/`],
  mayImport: ["science", "domain", ...domainOrder.slice(0, n).map((earlier) => `domain/${earlier}`)],
}));

const domain = ["domain", ...domainOrder.map((folder) => `domain/${folder}`)];
const baseComponents = [
  "components/ui",
  "components/charts",
  "components/tables",
  "components/drawing",
  "components/shell",
];
const drawingComponents = ["components/ui", "format", "science", ...domain];

export const layers: Layer[] = [
  { name: "science", paths: ["lib/science/"], mayImport: [] },
  domainRoot,
  ...domainFolders,
  { name: "contracts", paths: ["lib/contracts/"], mayImport: ["science", ...domain] },
  { name: "format", paths: ["lib/format/"], mayImport: ["science", ...domain] },
  { name: "env", paths: ["lib/env/"], mayImport: [] },
  { name: "client", paths: ["lib/client/"], mayImport: ["contracts", "science", "format", ...domain] },
  { name: "db", paths: ["db/"], mayImport: ["science", "contracts", "env", ...domain] },
  { name: "search", paths: ["search/"], mayImport: ["contracts", "env", ...domain] },
  { name: "search/stand-in", paths: ["search/stand-in/"], mayImport: [] },
  { name: "services", paths: ["lib/services/"], mayImport: ["env", "contracts"] },
  {
    name: "server",
    paths: ["lib/server/"],
    mayImport: ["science", "contracts", "format", "env", "db", "search", "services", ...domain],
  },
  { name: "auth", paths: ["lib/auth/"], mayImport: ["db", "services", "env", ...domain] },
  { name: "http", paths: ["lib/http/"], mayImport: ["server", "auth", "contracts", "env", ...domain] },
  {
    name: "cli",
    paths: ["lib/cli/"],
    mayImport: [
      "server",
      "science",
      "contracts",
      "format",
      "env",
      "db",
      "search",
      "search/stand-in",
      "services",
      ...domain,
    ],
  },
  { name: "components/ui", paths: ["components/ui/"], mayImport: ["format"] },
  { name: "components/charts", paths: ["components/charts/"], mayImport: drawingComponents },
  { name: "components/tables", paths: ["components/tables/"], mayImport: drawingComponents },
  { name: "components/drawing", paths: ["components/drawing/"], mayImport: drawingComponents },
  { name: "components/shell", paths: ["components/shell/"], mayImport: ["components/ui", "client", "format"] },
  {
    name: "components/turn",
    paths: ["components/turn/"],
    mayImport: ["components/ui", "components/charts", "client"],
  },
  {
    name: "components/*",
    paths: ["components/*/"],
    mayImport: [...baseComponents, "components/turn", "client", "contracts", "format", ...domain],
  },
  { name: "app/api", paths: ["app/api/"], mayImport: ["http", "server", "contracts"] },
  { name: "app/api/auth", paths: ["app/api/auth/"], mayImport: ["http", "server", "contracts", "auth"] },
  { name: "edge", paths: ["proxy.ts", "instrumentation.ts"], mayImport: ["env", "http", "server"] },
  { name: "knexfile", paths: ["knexfile.ts"], mayImport: ["env", "db"] },
  {
    name: "app",
    paths: ["app/"],
    mayImport: [...baseComponents, "components/*", "server", "auth", "client", "contracts", "format", ...domain],
  },
  { name: "settings", paths: ["next.config.mjs", "tailwind.config.ts"], mayImport: [] },
];

/** Packages that one part alone uses, so that they can be replaced there. Types count as use. */
export const packageHomes: Record<string, string[]> = {
  knex: ["db/", "knexfile.ts"],
  pg: ["db/"],
  "pg-boss": ["lib/services/jobs/"],
  nodemailer: ["lib/services/mail/"],
  "smtp-server": ["lib/services/mail/"],
  "@aws-sdk/client-s3": ["lib/services/storage/"],
  meilisearch: ["search/"],
  "next-auth": ["lib/auth/", "app/api/auth/", "lib/client/"],
  three: ["components/turn/"],
  fontkit: ["lib/services/pictures/"],
  "pdf-lib": ["lib/server/kit/"],
  "chart.js": ["components/charts/"],
  "react-chartjs-2": ["components/charts/"],
  "chartjs-plugin-annotation": ["components/charts/"],
};

/**
 * Where `process.env` may be read: the settings; the search stand-in, which is a server apart and knows nothing of ours;
 * and instrumentation, where Next replaces NEXT_RUNTIME as it builds. Tests may.
 */
export const environmentReaders = ["lib/env/", "search/stand-in/", "instrumentation.ts", "tests/"];

/** Parts that are pure: no clock, randomness, environment or I/O. */
export const pureFolders = ["lib/science/", "lib/domain/"];

/** Packages that compute from what they are given alone, and may be used there. */
export const purePackages = ["saxes", "fflate"];

/** Files that may be long: they are data, or a history that isn't edited. */
export const longFilesAllowed = [
  /(^|\/)tables\//,
  /(^|\/)data\//,
  /^db\/migrations\//,
  /(^|\/)fixtures\//,
  /^tests\/.*\/values\//,
];
