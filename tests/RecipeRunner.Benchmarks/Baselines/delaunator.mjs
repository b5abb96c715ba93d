// Triangulates with delaunator each time a line comes in; answers with milliseconds and the number of triangles.
import { readFileSync } from "node:fs";
import { createInterface } from "node:readline";
import { createRequire } from "node:module";
import { pathToFileURL } from "node:url";

const [packages, points] = process.argv.slice(2);
const entry = createRequire(packages + "/package.json").resolve("delaunator");
const module = await import(pathToFileURL(entry));
const Delaunator = module.default?.default ?? module.default;
const bytes = readFileSync(points);
const coordinates = new Float64Array(bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.byteLength));
console.log("ready");
for await (const _ of createInterface({ input: process.stdin })) {
  const start = process.hrtime.bigint();
  const result = new Delaunator(coordinates);
  const elapsed = Number(process.hrtime.bigint() - start) / 1e6;
  console.log(`${elapsed} ${result.triangles.length / 3}`);
}
