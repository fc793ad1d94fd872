import { describeValue } from "../../../cosmo/errors";
import { CommandError } from "../commandError";

/** The pairs of "a=b, c=d". */
export function splitPairs(
  lists: readonly string[],
  option: string,
  example: string,
): { name: string; value: string }[] {
  return lists
    .flatMap((list) => list.split(","))
    .map((pair) => {
      const [name, ...rest] = pair.split("=");
      const value = rest.join("=").trim();
      if (name === undefined || name.trim() === "" || value === "") {
        throw new CommandError(`derive: --${option} must look like ${example}, got ${describeValue(pair.trim())}`);
      }
      return { name: name.trim(), value };
    });
}
