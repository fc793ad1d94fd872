import { readFileSync } from "node:fs";
import { join } from "node:path";
import { Ajv } from "ajv";

/**
 * What Jupyter's own schema of nbformat 4.5 finds wrong with a notebook; empty if nothing.
 *
 * The schema is of JSON schema draft 4. Ajv reads newer drafts; none of the words that changed their meaning since
 * (`id`, `exclusiveMinimum`, `exclusiveMaximum` as yes or no) stands in it as a keyword, so that it is read as it is meant.
 */
export function schemaComplaints(notebook: unknown): string[] {
  const file = join(__dirname, "..", "reference", "nbformat", "nbformat.v4.5.schema.json");
  const { $schema: _, ...schema } = JSON.parse(readFileSync(file, "utf8"));
  const validate = new Ajv({ strict: false, allErrors: true }).compile(schema);
  // What is on disk counts, not what JavaScript holds.
  validate(JSON.parse(JSON.stringify(notebook)));
  return (validate.errors ?? []).map((error) => `${error.instancePath} ${error.message}`);
}
