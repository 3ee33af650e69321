// What `npm test` and `npm start` need before anything else can run. Imports nothing but Node's own modules.
import { execFileSync, spawnSync } from "node:child_process";
import fs from "node:fs";
import path from "node:path";

export const root = path.join(import.meta.dirname, "..");

/** Installs the packages of the lock file, unless they are all there in the versions it names. */
export function installPackages() {
  if (installed()) return;
  console.log("Installing packages (npm ci) …");
  execFileSync("npm", ["ci", "--no-audit", "--no-fund", "--loglevel=error"], {
    cwd: root,
    stdio: ["ignore", "inherit", "inherit"],
  });
}

function installed() {
  const read = (file) => JSON.parse(fs.readFileSync(path.join(root, file), "utf8")).packages;
  try {
    const have = read("node_modules/.package-lock.json");
    return Object.entries(read("package-lock.json")).every(
      ([name, { version, optional }]) => name === "" || (have[name] ? have[name].version === version : optional === true),
    );
  } catch {
    return false;
  }
}

/** Makes sure of programs that come from Debian's packages: { package: [program, …] }. */
export function needDebian(packages) {
  const lacking = Object.entries(packages).filter(([, programs]) => !programs.some(onPath));
  if (!lacking.length) return;
  const names = lacking.map(([name]) => name);
  const apt = (...args) =>
    spawnSync("apt-get", args, {
      stdio: ["ignore", "ignore", "inherit"],
      env: { ...process.env, DEBIAN_FRONTEND: "noninteractive" },
    });
  if (process.getuid?.() === 0 && onPath("apt-get")) {
    console.log(`Installing ${names.join(", ")} (apt-get) …`);
    apt("update", "-q");
    if (apt("install", "-y", "-q", "--no-install-recommends", ...names).status === 0) return;
  }
  console.error(
    `The tests need ${names.join(" and ")}. Install with: sudo apt-get install --no-install-recommends ${names.join(" ")}`,
  );
  console.error("(or set CHROMIUM to a Chromium's path and put ripgrep's rg on the PATH)");
  process.exit(1);
}

/** True where a program of that name can be run. */
export function onPath(program) {
  if (program.startsWith("chromium") && process.env.CHROMIUM) return true;
  const endings = process.platform === "win32" ? [".cmd", ".exe", ""] : [""];
  return (process.env.PATH ?? "")
    .split(path.delimiter)
    .some((folder) => endings.some((ending) => fs.existsSync(path.join(folder, program + ending))));
}
