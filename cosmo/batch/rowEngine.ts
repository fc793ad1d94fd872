import type { ConstantsSet } from "../constants";
import { AtomMarch } from "./atomMarch";
import { atomTables } from "./atomTables";
import type { BoundColumns } from "./batchColumns";
import { BatchRow } from "./batchRow";
import { gasPerUnit, RowCloser } from "./closeRow";
import { GridDamping } from "./gridDamping";
import { GridDepths } from "./gridDepths";
import { GridExpansion } from "./gridExpansion";
import { Horizons } from "./horizons";
import { RedshiftLadder } from "./redshiftLadder";
import { fillSquaredTerms } from "./rowExpansion";
import { rowStatus } from "./rowStatus";
import { staysExpanding } from "./validatedRange";

/** What the outputs of a plan need of every row. */
export interface EngineNeeds {
  readonly history: boolean;
  readonly damping: boolean;
  readonly age: boolean;
  /** Redshifts of distances, times and rates; undefined where no output has one. */
  readonly redshifts: readonly number[] | undefined;
}

/** All that is computed of one row; one object serves every row of a plan. */
export class RowEngine {
  readonly row = new BatchRow();
  readonly horizons = new Horizons();
  readonly ladder: RedshiftLadder;
  /** z_*, z_drag, k_D in 1/Mpc. */
  lastScatteringRedshift = 0.5;
  dragRedshift = 0.5;
  dampingWavenumber = 0.5;
  private readonly scaleFactor = new Float64Array(1);
  private readonly logScaleFactor = new Float64Array(1);
  private readonly term = new Float64Array(1);
  private closer: RowCloser | undefined;
  private readonly expansion = new GridExpansion();
  private readonly march: AtomMarch;
  private readonly depths = new GridDepths();
  private readonly damping: GridDamping;

  constructor(
    readonly constants: ConstantsSet,
    tier: "peebles" | "calibrated",
    private readonly allMatter: boolean,
    private readonly needs: EngineNeeds,
  ) {
    this.march = new AtomMarch(atomTables(tier, constants), gasPerUnit(constants).comptonRate);
    this.damping = new GridDamping(constants);
    this.ladder = new RedshiftLadder(needs.redshifts ?? []);
  }

  /** Takes the columns that the next rows come from. */
  bind(bound: BoundColumns): void {
    this.closer = new RowCloser(bound, this.constants);
  }

  /** a at equality. */
  equalityScaleFactor(): number {
    const { row } = this;
    const matter = this.allMatter ? row.matterDensity : row.baryonDensity + row.coldMatterDensity;
    return (row.photonDensity + 3 * row.speciesDensity) / matter;
  }

  /** a^4 (H/100 km/s/Mpc)^2. */
  squaredTerm(a: number): number {
    const { scaleFactor, logScaleFactor, term } = this;
    scaleFactor[0] = a;
    logScaleFactor[0] = Math.log(a);
    fillSquaredTerms(this.row, scaleFactor, logScaleFactor, term, 0, 1);
    return term[0];
  }

  /** Computes a row; a status other than `engine` says why it has to take the single path. */
  compute(index: number): number {
    const { row, needs } = this;
    if (this.closer === undefined || !this.closer.close(index, row)) return rowStatus.outsideRange;
    if (!staysExpanding(row)) return rowStatus.nearTurningPoint;
    if (needs.redshifts !== undefined) this.ladder.run(row);
    if (needs.history) {
      const { inverseRate } = this.expansion;
      this.expansion.fill(row);
      this.march.run(row, inverseRate);
      this.depths.run(row, inverseRate, this.march.ionized);
      const { lastScattering, drag } = this.depths;
      if (lastScattering.lower < 0 || drag.lower < 0) return rowStatus.offGrid;
      const star = row.photonTemperature / lastScattering.temperature;
      const dragScale = row.photonTemperature / drag.temperature;
      this.lastScatteringRedshift = lastScattering.temperature / row.photonTemperature - 1;
      this.dragRedshift = drag.temperature / row.photonTemperature - 1;
      this.horizons.run(row, star, dragScale);
      if (needs.damping) {
        this.dampingWavenumber = this.damping.run(row, inverseRate, this.march.ionized, lastScattering);
      }
    } else if (needs.age) {
      this.horizons.runAge(row);
    }
    return rowStatus.engine;
  }
}
