// Reads the crate in a folder with the packages ro-crate (its reader and validator) and jsonld (expansion in safe mode, which
// fails on a property or type that no context defines). Prints what it found as JSON. No network: the two contexts that a crate
// names are served from here.
const fs = require("fs");
const path = require("path");

const bundled = JSON.parse(
  fs.readFileSync(path.join(path.dirname(require.resolve("ro-crate/package.json")), "lib", "context.json"), "utf8"),
);
const terms = "https://w3id.org/ro/terms/workflow-run#";
const contexts = {
  // The package bundles the context of RO-Crate 1.2, which defines all terms of 1.1.
  "https://w3id.org/ro/crate/1.1/context": bundled,
  // source: repository ResearchObject/ro-terms, workflow-run/context.json
  "https://w3id.org/ro/terms/workflow-run/context": {
    "@context": Object.fromEntries(
      ["ParameterConnection", "connection", "sourceParameter", "targetParameter", "md5", "sha1", "sha256", "sha512"].map(
        (term) => [term, terms + term],
      ),
    ),
  },
};
globalThis.fetch = async (url) => {
  if (!(url in contexts)) throw new Error(`unknown context ${url}`);
  return { ok: true, json: async () => contexts[url] };
};

const { ROCrate } = require("ro-crate");
const { Validator } = require(path.join(path.dirname(require.resolve("ro-crate/package.json")), "lib", "validator.js"));
const jsonld = require("jsonld");

async function main(folder) {
  const raw = fs.readFileSync(path.join(folder, "ro-crate-metadata.json"), "utf8");
  const found = {};
  const loaded = new ROCrate(JSON.parse(raw), { array: true, link: true });
  await loaded.resolveContext();
  const validator = new Validator(loaded);
  await validator.validate();
  const files = {};
  for (const name of fs.readdirSync(folder, { recursive: true })) {
    files[name] = { exists: true, inCrate: false, isDir: fs.lstatSync(path.join(folder, name)).isDirectory() };
  }
  validator.checkFiles(files);
  found.complaints = validator.results
    .filter((result) => result.status !== "success" && !files[result.entity]?.isDir)
    .map((result) => `${result.entity ?? ""} ${result.message}`.trim());

  const documentLoader = async (url) => ({ contextUrl: null, documentUrl: url, document: contexts[url] });
  const expanded = await jsonld.expand(JSON.parse(raw), { base: "file:///study/", documentLoader, safe: true });
  found.expanded = expanded.length;

  const run = loaded.rootDataset.mentions.find((entity) => entity["@id"] === "#run");
  found.workflow = loaded.rootDataset.mainEntity[0]["@id"];
  found.steps = loaded.rootDataset.mainEntity[0].step.length;
  found.results = run.result.map((entity) => entity["@id"]);
  found.objects = run.object.map((entity) => entity["@id"]);
  found.dangling = [...loaded.entities()].flatMap((entity) =>
    Object.entries(loaded.getEntity(entity["@id"]))
      .flatMap(([name, value]) => (Array.isArray(value) ? value : [value]).map((item) => [name, item]))
      .filter(([, item]) => item && typeof item === "object" && item["@id"] && !loaded.getEntity(item["@id"]))
      .map(([name, item]) => `${entity["@id"]} ${name} ${item["@id"]}`),
  );
  console.log(JSON.stringify(found));
}

main(process.argv[2]).catch((error) => {
  console.error(error);
  process.exit(1);
});
