import { describeValue } from "../../../cosmo/errors";
import { CommandError } from "../commandError";

/** Text cut at the commas that stand outside parentheses: those inside separate a function's arguments. */
function pieces(list: string): string[] {
  const found = [""];
  let depth = 0;
  for (const character of list) {
    if (character === "(") depth++;
    if (character === ")") depth--;
    if (character === "," && depth === 0) found.push("");
    else found[found.length - 1] += character;
  }
  return found;
}

/** The pairs of "a=b, c=d". */
export function splitPairs(
  lists: readonly string[],
  option: string,
  example: string,
): { name: string; value: string }[] {
  return lists.flatMap(pieces).map((pair) => {
    const [name, ...rest] = pair.split("=");
    const value = rest.join("=").trim();
    if (name === undefined || name.trim() === "" || value === "") {
      throw new CommandError(`derive: --${option} must look like ${example}, got ${describeValue(pair.trim())}`);
    }
    return { name: name.trim(), value };
  });
}
