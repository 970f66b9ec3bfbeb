import fs from "node:fs";
import path from "node:path";
import { Failure } from "./failure.mjs";

/** The repository's root folder. */
export const root = path.resolve(import.meta.dirname, "../..");

/** Everything this installation keeps beside the code: never committed. */
export const runDir = path.join(root, ".run");

/**
 * Joins names under the run folder.
 * @param {...string} names
 * @returns {string} an absolute path
 */
export const inRun = (...names) => path.join(runDir, ...names);

/** Makes the run folder, or says who may. */
export function ensureRunDir() {
  try {
    fs.mkdirSync(runDir, { recursive: true });
    fs.accessSync(runDir, fs.constants.W_OK | fs.constants.X_OK);
  } catch {
    throw new Failure(
      `This account cannot write in ${runDir}.`,
      "Use the account that started Cembalo here the first time, or change the folder's owner.",
    );
  }
}

/**
 * Reads a JSON file.
 * @param {string} file
 * @returns {any} its content, or null when it is missing or not JSON
 */
export function readJson(file) {
  try {
    return JSON.parse(fs.readFileSync(file, "utf8"));
  } catch {
    return null;
  }
}

/**
 * Writes a JSON file whole or not at all.
 * @param {string} file
 * @param {unknown} value
 */
export function writeJson(file, value) {
  fs.mkdirSync(path.dirname(file), { recursive: true });
  const partial = `${file}.${process.pid}.partial`;
  fs.writeFileSync(partial, `${JSON.stringify(value, null, 2)}\n`, { mode: 0o600 });
  fs.renameSync(partial, file);
}

/**
 * Reads a text file.
 * @param {string} file
 * @returns {string | null} its trimmed content, or null when there is none
 */
export function readText(file) {
  try {
    return fs.readFileSync(file, "utf8").trim();
  } catch {
    return null;
  }
}
