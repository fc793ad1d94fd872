import { DomainError, InconsistentParametersError, UnknownNameError } from "../errors";
import type { FlatGivens } from "../model";
import { type Slot, slots } from "./slots";

/** A given that is no field of its own: what the model must come out with. */
export interface Equation {
  readonly name: string;
  readonly value: number;
}

/** What is to be solved: fields as given, parameters that are open, and the numbers that determine them. */
export interface Plan {
  readonly fields: FlatGivens;
  readonly unknowns: readonly Slot[];
  /** At least as many as unknowns; those beyond are checks. */
  readonly equations: readonly Equation[];
}

/**
 * Sorts givens into fields that fill slots, open slots and equations.
 *
 * A slot without a given is open when the model needs it, when `solveFor` names it, or when a given determines nothing else
 * (omega_nu the masses, omega_gamma the temperature). Second forms of a slot that is filled, and derived numbers, are equations.
 *
 * Throws where there are fewer equations than open slots.
 */
export function planSolution(
  flat: FlatGivens,
  solveFor: readonly string[],
  where: string,
  place: string | undefined,
): Plan {
  checkSolveFor(flat, solveFor, where, place);
  const fields = new Map(flat);
  const equations: Equation[] = [];
  const unknowns: Slot[] = [];
  const fillers = new Set(slots.flatMap((slot) => slot.fillers));
  const move = (name: string) => {
    equations.push({ name, value: flat.get(name) as number });
    fields.delete(name);
  };
  for (const slot of slots) {
    const present = slot.fillers.filter((name) => flat.has(name));
    const asked = solveFor.some((name) => slot.fillers.includes(name));
    if (present.length === 0) {
      if (slot.required || asked || slot.determiners.some((name) => flat.has(name))) unknowns.push(slot);
      continue;
    }
    // A list of masses and their sum are refused further down, as one thing stated twice.
    if (slot.parameter !== "neutrinos.massSum") for (const extra of present.slice(1)) move(extra);
  }
  for (const [name, value] of flat) {
    if (fillers.has(name) || name.includes(".") || typeof value !== "number") continue;
    if (derivedOnly(name, fillers)) move(name);
  }
  if (equations.length < unknowns.length && (equations.length > 0 || solveFor.length > 0)) {
    const open = unknowns.map((slot) => slot.parameter);
    const have = equations.map((equation) => equation.name);
    throw new InconsistentParametersError({
      where,
      parameters: open,
      problem: "missing",
      reason: `${open.length} parameters are open (${open.join(", ")}) and ${have.length === 0 ? "nothing determines them" : `only ${have.length} ${have.length === 1 ? "number determines" : "numbers determine"} them (${have.join(", ")})`}${place === undefined ? "" : ` (${place})`}`,
      hint: `give ${open.length - have.length} more: ${unknowns.map((slot) => slot.fillers.join(" or ")).join("; ")}; or a derived number such as age, acousticAngle or dragSoundHorizon`,
    });
  }
  return { fields, unknowns, equations };
}

/** Fields that are neither slots nor derived numbers, such as helium's word or the spectral index, stay as they are. */
const plainFields = new Set(["helium", "scalarSpectralIndex"]);

function derivedOnly(name: string, fillers: ReadonlySet<string>): boolean {
  return !fillers.has(name) && !plainFields.has(name);
}

function checkSolveFor(flat: FlatGivens, solveFor: readonly string[], where: string, place: string | undefined): void {
  const known = slots.flatMap((slot) => slot.fillers);
  for (const name of solveFor) {
    if (!known.includes(name)) throw new UnknownNameError({ where, kind: "parameter in solveFor", given: name, known });
    const slot = slots.find((each) => each.fillers.includes(name))!;
    const given = slot.fillers.find((filler) => flat.has(filler));
    if (given !== undefined) {
      throw new DomainError({
        where,
        argument: "solveFor",
        rule: `must not name what is given: ${given} fixes ${slot.parameter}`,
        value: name,
        place,
      });
    }
  }
}
