/*
 * The batch engine of cosmo/batch in plain scalar C: the same tables, grid, march and quadratures, statement by statement, as the
 * limit of what the algorithm can be had for. The tables come from a header that tables.mjs writes.
 *
 *   suite MODELS COUNT ROUNDS
 *
 * MODELS and the output are those of ../gsl/suite.c; the seconds are those of ROUNDS rounds over the models.
 */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <sys/resource.h>
#include <time.h>

#include "tables.h"

typedef struct {
  double reducedHubble, baryons, cold, neutrinoDensity, radiation, species, darkEnergy, curvature, w0, wa, number;
  int massCount;
  double logMass[3], massShare[3];
  double hydrogenDensity, heliumRatio, scattering, loading;
} Row;

typedef struct {
  int lower;
  double part, temperature;
} Crossing;

static double inverseRate[gridSize], neutrinos[gridSize];
static double neutral[gridSize], cooling[gridSize], ionized[gridSize], neutralHelium[gridSize], places[heliumPoints];
static double rate[gridSize], dragRate[gridSize], integrand[gridSize];
static double logPhotonTemperature;

/* ---- closing a row */

static double tabulatedEnergy(double logMassRatio) {
  const double place = (logMassRatio - lowestLogMass) / gridStep;
  if (!(place >= 1)) return 1;
  const int index = (int)place;
  const double p = place - index, q = 1 - p;
  return neutrinoEnergy[index] * q * (1 + p) * (1 - 0.5 * p) + neutrinoEnergy[index + 1] * p * (1 + q) * (1 - 0.5 * q) -
         p * q * (neutrinoEnergy[index - 1] * (1 + q) + neutrinoEnergy[index + 2] * (1 + p)) / 6;
}

static void closeNeutrinos(Row *row, double number, const double *masses) {
  static double held[4] = {-1, -1, -1, -1};
  if (held[0] == number && held[1] == masses[0] && held[2] == masses[1] && held[3] == masses[2]) return;
  held[0] = number;
  memcpy(held + 1, masses, 3 * sizeof(double));
  double mass[3] = {masses[0], masses[1], masses[2]}, swap;
  if (mass[0] < mass[1]) swap = mass[0], mass[0] = mass[1], mass[1] = swap;
  if (mass[1] < mass[2]) swap = mass[1], mass[1] = mass[2], mass[2] = swap;
  if (mass[0] < mass[1]) swap = mass[0], mass[0] = mass[1], mass[1] = swap;
  const double temperature = neutrinoTemperatureOfOne * pow(number, 0.25);
  int massive = 0;
  row->number = number;
  row->species = speciesPerNumber * number;
  row->massCount = 0;
  row->neutrinoDensity = 0;
  for (int m = 0; m < 3; m++) {
    if (!(mass[m] > 0)) continue;
    massive++;
    const double logRatio = log(mass[m] * electronvoltOverBoltzmann / temperature);
    row->neutrinoDensity += row->species * tabulatedEnergy(logRatio);
    if (m > 0 && mass[m] == mass[m - 1]) {
      row->massShare[row->massCount - 1] += 1;
    } else {
      row->logMass[row->massCount] = logRatio;
      row->massShare[row->massCount++] = 1;
    }
  }
  row->radiation = photons + (3 - massive) * row->species;
  memset(neutrinos, 0, sizeof neutrinos);
  for (int m = 0; m < row->massCount; m++) {
    const double place = (row->logMass[m] + logPhotonTemperature - mainTop - lowestLogMass) / gridStep;
    const int index = (int)floor(place);
    const double p = place - index, q = 1 - p, weight = row->massShare[m];
    const double w0 = -weight * p * q * (1 + q) / 6, w1 = weight * q * (1 + p) * (1 - 0.5 * p);
    const double w2 = weight * p * (1 + q) * (1 - 0.5 * q), w3 = -weight * p * q * (1 + p) / 6;
    for (int i = 0; i < gridSize; i++) {
      const int base = index + gridPlaces[i];
      if (base < 1) neutrinos[i] += weight;
      else
        neutrinos[i] += w0 * neutrinoEnergy[base - 1] + w1 * neutrinoEnergy[base] + w2 * neutrinoEnergy[base + 1] +
                        w3 * neutrinoEnergy[base + 2];
    }
  }
}

static void closeRow(Row *row, const double *given) {
  const double h = given[0] / 100, h2 = h * h, w = given[1], d = given[6] - 3.046, r = heliumMass / 4;
  closeNeutrinos(row, given[6], given + 7);
  row->reducedHubble = h;
  row->baryons = w;
  row->cold = given[2];
  row->curvature = given[3];
  row->w0 = given[4];
  row->wa = given[5];
  row->darkEnergy = h2 * (1 - row->curvature) - w - row->cold - row->neutrinoDensity - row->radiation;
  const double Y = 0.2311 + w * (0.9502 - 11.27 * w) + d * (0.01356 + w * (0.008581 - 0.181 * w)) +
                   d * d * (-0.0009795 + w * (-0.00137 + 0.01746 * w));
  const double byMass = r * Y / (r * Y + 1 - Y);
  row->hydrogenDensity = (1 - byMass) * w * hydrogenPerBaryons;
  row->heliumRatio = byMass / (heliumMass * (1 - byMass));
  row->scattering = scatteringPerHydrogen * row->hydrogenDensity;
  row->loading = 3 * w / (4 * photons);
}

/* ---- expansion */

static void addEnergy(double logMassRatioToday, double weight, const double *logs, double *sum, int from, int to) {
  const double offset = (logMassRatioToday - lowestLogMass) / gridStep, perStep = 1 / gridStep;
  for (int i = from; i < to; i++) {
    const double place = offset + logs[i] * perStep;
    if (!(place >= 1)) {
      sum[i] += weight;
      continue;
    }
    const int k = (int)place;
    const double p = place - k, q = 1 - p;
    sum[i] += weight * (q * (1 + p) * (1 - 0.5 * p) * neutrinoEnergy[k] +
                        p * (1 + q) * (1 - 0.5 * q) * neutrinoEnergy[k + 1] -
                        p * q * ((1 + q) * neutrinoEnergy[k - 1] + (1 + p) * neutrinoEnergy[k + 2]) / 6);
  }
}

static void fillSquaredTerms(const Row *row, const double *a, const double *logs, double *out, int from, int to) {
  const double radiation = row->radiation, matter = row->baryons + row->cold, darkEnergy = row->darkEnergy;
  const double curvature = row->curvature * row->reducedHubble * row->reducedHubble;
  if (row->w0 == -1 && row->wa == 0) {
    for (int i = from; i < to; i++) {
      const double here = a[i], square = here * here;
      out[i] = radiation + here * (matter + here * curvature) + square * square * darkEnergy;
    }
  } else {
    const double power = -3 * (row->w0 + row->wa), tilt = 3 * row->wa;
    for (int i = from; i < to; i++) {
      const double here = a[i], growth = power * logs[i] - tilt * (1 - here);
      const double seen = growth < -23 ? 0 : darkEnergy * exp(growth);
      out[i] = radiation + here * (matter + seen + here * curvature);
    }
  }
  for (int m = 0; m < row->massCount; m++)
    addEnergy(row->logMass[m], row->species * row->massShare[m], logs, out, from, to);
}

static void fillExpansion(const Row *row) {
  const double scale = 1 / photonTemperature, species = row->species, radiation = row->radiation;
  const double matter = row->baryons + row->cold, darkEnergy = row->darkEnergy;
  const double curvature = row->curvature * row->reducedHubble * row->reducedHubble;
  if (row->w0 == -1 && row->wa == 0) {
    for (int i = 0; i < gridSize; i++) {
      const double x = temperatures[i] * scale;
      inverseRate[i] =
          1 / sqrt(x * x * (x * (x * (radiation + species * neutrinos[i]) + matter) + curvature) + darkEnergy);
    }
    return;
  }
  const double power = 3 * (1 + row->w0 + row->wa), tilt = 3 * row->wa, fineFactor = exp(-power * gridStep);
  double factor = exp(-power * gridStep * coarseStride), grown = 0;
  for (int b = -1; b < blocks; b++) {
    const int first = b < 0 ? 0 : blockFirst[b], end = b < 0 ? heliumPoints : blockEnd[b];
    if (b == 0) factor = fineFactor;
    else if (b > 0) factor *= factor;
    for (int i = first; i < end; i++) {
      if (i == 0 || i == mainFirst) grown = darkEnergy * exp(power * log(temperatures[i] * scale) - tilt);
      else grown *= factor;
      const double x = temperatures[i] * scale, s = tilt / x;
      const double total = x * x * (x * (x * (radiation + species * neutrinos[i]) + matter) + curvature) +
                           grown * (1 + s * (1 + s * (1.0 / 2 + s * (1.0 / 6 + s * (1.0 / 24)))));
      inverseRate[i] = 1 / sqrt(total);
    }
  }
}

/* ---- recombination */

static double sobolevEscape(double depth) {
  if (!(depth < deepest)) return 1 / depth;
  const double place = depth * sobolevPerDepth;
  const int k = (int)place;
  const double p = place - k, q = 1 - p, outer = p * q / -6;
  return outer * ((1 + q) * sobolev[k] + (1 + p) * sobolev[k + 3]) +
         (q * (1 + p) * (1 - 0.5 * p) * sobolev[k + 1] + p * (1 + q) * (1 - 0.5 * q) * sobolev[k + 2]);
}

static double continuumPlace(double g) {
  const double place = sqrt(sqrt(sqrt(g))) * continuumPerRoot;
  return fmin(place, highestRoot * continuumPerRoot);
}

static double lineEscapes(const double *h, double depths, double place) {
  int k = (int)place;
  const double p = place - k, q = 1 - p, outer = p * q / -6;
  k *= 2;
  const double w0 = outer * (1 + q), w1 = q * (1 + p) * (1 - 0.5 * p), w2 = p * (1 + q) * (1 - 0.5 * q);
  const double w3 = outer * (1 + p), *t = continuumEscapes + k;
  const double singletContinuum = w0 * t[0] + w1 * t[2] + (w2 * t[4] + w3 * t[6]);
  const double tripletContinuum = w0 * t[1] + w1 * t[3] + (w2 * t[5] + w3 * t[7]);
  const double singletDecay = h[4] * (1 / (h[8] * depths) + singletContinuum) + heliumTwoPhoton;
  const double tripletDecay = h[6] * (sobolevEscape(h[9] * depths) + tripletContinuum);
  return h[0] * singletDecay / (singletDecay + h[5]) + h[1] * tripletDecay / (tripletDecay + h[7]);
}

static void marchHelium(const Row *row) {
  enum { startPoints = equilibriumPoints + 1, last = startPoints - 1 };
  const double density = row->hydrogenDensity / (photonTemperature * photonTemperature * photonTemperature);
  const double ratio = row->heliumRatio;
  for (int i = 0; i < startPoints; i++) {
    const double n = density * rates[i * hydrogenColumns + 9], s = helium[i * heliumColumns + 2] / n;
    const double hydrogen = hydrogenSaha[i] / n;
    double electrons = 1 + ratio;
    const double share = electrons / (hydrogen + electrons), b = 1 - share + s;
    electrons = 1 - share + ratio * 2 * s / (b + sqrt(b * b + 4 * ratio * s));
    neutral[i] = share;
    neutralHelium[i] = electrons / (electrons + s);
    places[i] = continuumPlace(helium[i * heliumColumns + 10] * ratio * neutralHelium[i] / share);
    ionized[i] = electrons;
  }
  const double c1 = pastWeights[0], c2 = pastWeights[1], c3 = pastWeights[2], c4 = pastWeights[3], c5 = pastWeights[4];
  const double c6 = pastWeights[5], p1 = predictionWeights[0], p2 = predictionWeights[1], p3 = predictionWeights[2];
  const double p4 = predictionWeights[3], p5 = predictionWeights[4], p6 = predictionWeights[5];
  const double weight = coarseStride * gridStep * slopeWeight / unitRate, perRate = 1 / unitRate;
  double y1 = neutralHelium[last], y2 = neutralHelium[last - 1], y3 = neutralHelium[last - 2];
  double y4 = neutralHelium[last - 3], y5 = neutralHelium[last - 4], y6 = neutralHelium[last - 5];
  for (int i = startPoints; i < heliumPoints; i++) {
    const double *h = helium + i * heliumColumns, n = density * rates[i * hydrogenColumns + 9];
    const double past = c1 * y1 + (c2 * y2 + c3 * y3 + (c4 * y4 + c5 * y5 + c6 * y6));
    double y = p1 * y1 + (p2 * y2 + p3 * y3 + (p4 * y4 + p5 * y5 + p6 * y6));
    const double place = 21 * places[i - 2] - 70 * places[i - 3] + (105 * places[i - 4] - 84 * places[i - 5]) +
                         (35 * places[i - 6] - 6 * places[i - 7]);
    const double hydrogen = hydrogenSaha[i] / n, before = 1 / (1 + hydrogen / (1 + ratio * (1 - y1)));
    const double ionizations = h[2], depths = ratio * y * n * inverseRate[i] * perRate;
    const double through = weight * inverseRate[i] * lineEscapes(h, depths, place);
    const double held = n * (1 - before + ratio * (1 - y));
    y -= (y - past - through * (held * (1 - y) - ionizations * y)) /
         (1 + through * (held + n * ratio * (1 - y) + ionizations));
    y6 = y5, y5 = y4, y4 = y3, y3 = y2, y2 = y1, y1 = y;
    const double electrons = 1 - before + ratio * (1 - y), x = electrons / (hydrogen + electrons);
    places[i] = continuumPlace(h[10] * ratio * y * (hydrogen + electrons) / electrons);
    neutral[i] = x;
    neutralHelium[i] = y;
    ionized[i] = 1 - x + ratio * (1 - y);
  }
  for (int i = mainFirst, k = heliumAtMainTop; i < heliumEnd; i += 2, k++) {
    neutralHelium[i] = neutralHelium[k];
    neutralHelium[i + 1] =
        (9 * (neutralHelium[k] + neutralHelium[k + 1]) - (neutralHelium[k - 1] + neutralHelium[k + 2])) / 16;
  }
}

static void startHydrogen(const Row *row) {
  const double density = row->hydrogenDensity / (photonTemperature * photonTemperature * photonTemperature);
  const double ratio = row->heliumRatio;
  for (int i = mainFirst; i < mainFirst + equilibriumPoints; i++) {
    const double n = density * rates[i * hydrogenColumns + 9], hydrogen = hydrogenSaha[i] / n;
    const double once = 1 - neutralHelium[i];
    double share = 0;
    for (int k = 0; k < 4; k++) {
      const double electrons = 1 - share + ratio * once;
      share = electrons / (hydrogen + electrons);
    }
    const double electrons = 1 - share + ratio * once;
    neutral[i] = share;
    ionized[i] = electrons;
    cooling[i] = 1 / (1 + compton[i] * inverseRate[i] * electrons / (1 + ratio + electrons));
  }
}

static void marchWithHelium(const Row *row) {
  const double c1 = pastWeights[0], c2 = pastWeights[1], c3 = pastWeights[2], c4 = pastWeights[3], c5 = pastWeights[4];
  const double c6 = pastWeights[5], p1 = predictionWeights[0], p2 = predictionWeights[1], p3 = predictionWeights[2];
  const double p4 = predictionWeights[3], p5 = predictionWeights[4], p6 = predictionWeights[5];
  const double t1 = 48.0 / 25, t2 = -36.0 / 25, t3 = 16.0 / 25, t4 = -3.0 / 25;
  const double density = row->hydrogenDensity / (photonTemperature * photonTemperature * photonTemperature);
  const double ratio = row->heliumRatio, step = gridStep * slopeWeight, thermalStep = step * 12 / 25 / slopeWeight;
  const double weight = step / unitRate;
  const int last = mainFirst + equilibriumPoints - 1;
  double x1 = neutral[last], x2 = neutral[last - 1], x3 = neutral[last - 2], x4 = neutral[last - 3];
  double x5 = neutral[last - 4], x6 = neutral[last - 5];
  double d1 = cooling[last], d2 = cooling[last - 1], d3 = cooling[last - 2], d4 = cooling[last - 3];
  double d5 = cooling[last - 4];
  for (int i = mainFirst + equilibriumPoints; i < heliumEnd; i++) {
    const double inverse = inverseRate[i], span = weight * inverse, *r = rates + i * hydrogenColumns;
    const double pastX = c1 * x1 + (c2 * x2 + c3 * x3 + (c4 * x4 + c5 * x5 + c6 * x6));
    double x = p1 * x1 + (p2 * x2 + p3 * x3 + (p4 * x4 + p5 * x5 + p6 * x6));
    const double pastD = t1 * d1 + (t2 * d2 + (t3 * d3 + t4 * d4));
    const double predictedD = 5 * (d1 - d4) + (10 * (d3 - d2) + d5), once = 1 - neutralHelium[i];
    const double recombination = density * r[0] * (1 + predictedD * r[1]);
    const double ionization = r[3] * (1 + predictedD * (r[4] + predictedD * r[5]));
    const double ground = r[6] * (1 + predictedD * (r[7] + predictedD * r[8]));
    const double stuck = density * escapes[i] * inverse, decay = stuck * hydrogenTwoPhoton;
    const double blocked = decay + stuck * ionization;
    {
      const double free = 1 - x, electrons = free + ratio * once;
      const double net = recombination * electrons * free - ground * x;
      const double netSlope = recombination * (-free - electrons) - ground, gap = x - pastX;
      const double upper = span * (1 + decay * x), lower = 1 + blocked * x;
      x -= (gap * lower - net * upper) / (lower + gap * blocked - (netSlope * upper + span * net * decay));
    }
    const double electrons = 1 - x + ratio * once, particles = 1 + ratio + electrons;
    const double d = (pastD + thermalStep) * particles /
                     (particles * (1 + thermalStep) + thermalStep * inverse * compton[i] * electrons);
    x6 = x5, x5 = x4, x4 = x3, x3 = x2, x2 = x1, x1 = x;
    d5 = d4, d4 = d3, d3 = d2, d2 = d1, d1 = d;
    neutral[i] = x;
    cooling[i] = d;
    ionized[i] = electrons;
  }
}

static void marchHydrogen(int b, const Row *row) {
  const double c1 = pastWeights[0], c2 = pastWeights[1], c3 = pastWeights[2], c4 = pastWeights[3], c5 = pastWeights[4];
  const double c6 = pastWeights[5], p1 = predictionWeights[0], p2 = predictionWeights[1], p3 = predictionWeights[2];
  const double p4 = predictionWeights[3], p5 = predictionWeights[4], p6 = predictionWeights[5];
  const double t1 = 48.0 / 25, t2 = -36.0 / 25, t3 = 16.0 / 25, t4 = -3.0 / 25;
  const int start = b == 0 ? heliumEnd : blockFirst[b], end = blockEnd[b], back = b == 0 ? 1 : 2, last = start - 1;
  const double density = row->hydrogenDensity / (photonTemperature * photonTemperature * photonTemperature);
  const double others = 1 + row->heliumRatio, step = blockStride[b] * gridStep * slopeWeight;
  const double thermalStep = step * 12 / 25 / slopeWeight, weight = step / unitRate;
  double x1 = neutral[last], x2 = neutral[last - back], x3 = neutral[last - 2 * back], x4 = neutral[last - 3 * back];
  double x5 = neutral[last - 4 * back], x6 = neutral[last - 5 * back];
  double d1 = cooling[last], d2 = cooling[last - back], d3 = cooling[last - 2 * back], d4 = cooling[last - 3 * back];
  double d5 = cooling[last - 4 * back], d6 = cooling[last - 5 * back], d7 = cooling[last - 6 * back];
  for (int i = start; i < end; i++) {
    const double inverse = inverseRate[i], span = weight * inverse, *r = rates + i * hydrogenColumns;
    const double pastX = c1 * x1 + (c2 * x2 + c3 * x3 + (c4 * x4 + c5 * x5 + c6 * x6));
    double x = p1 * x1 + (p2 * x2 + p3 * x3 + (p4 * x4 + p5 * x5 + p6 * x6));
    const double pastD = t1 * d1 + (t2 * d2 + (t3 * d3 + t4 * d4));
    const double predictedD = 21 * d2 - 70 * d3 + (105 * d4 - 84 * d5) + (35 * d6 - 6 * d7);
    double recombination = density * r[0];
    if (predictedD < 3e-3) {
      recombination *= 1 + predictedD * (r[1] + predictedD * r[2]);
    } else {
      const double place = sqrt(temperatures[i] * (1 - predictedD)) * coldPerRoot;
      const int k = (int)place;
      recombination = density * r[9] * (cold[k] + (place - k) * (cold[k + 1] - cold[k]));
    }
    const double ionization = r[3] * (1 + predictedD * (r[4] + predictedD * r[5]));
    const double ground = r[6] * (1 + predictedD * (r[7] + predictedD * r[8]));
    const double stuck = density * escapes[i] * inverse, decay = stuck * hydrogenTwoPhoton;
    const double blocked = decay + stuck * ionization;
    {
      const double free = 1 - x, net = recombination * free * free - ground * x;
      const double netSlope = -2 * recombination * free - ground, gap = x - pastX;
      const double upper = span * (1 + decay * x), lower = 1 + blocked * x;
      x -= (gap * lower - net * upper) / (lower + gap * blocked - (netSlope * upper + span * net * decay));
    }
    const double electrons = 1 - x, particles = others + electrons;
    const double d = (pastD + thermalStep) * particles /
                     (particles * (1 + thermalStep) + thermalStep * inverse * compton[i] * electrons);
    x6 = x5, x5 = x4, x4 = x3, x3 = x2, x2 = x1, x1 = x;
    d7 = d6, d6 = d5, d5 = d4, d4 = d3, d3 = d2, d2 = d1, d1 = d;
    neutral[i] = x;
    cooling[i] = d;
    ionized[i] = electrons;
  }
}

/* ---- depths */

static void cross(const double *values, double below, Crossing *out) {
  double depth = below;
  out->lower = -1;
  if (!(below < 1)) return;
  for (int lower = searchStart; lower > searchEnd; lower--) {
    const double cell = gridStep * (innerCell[0] * (values[lower - 3] + values[lower + 2]) +
                                    innerCell[1] * (values[lower - 2] + values[lower + 1]) +
                                    innerCell[2] * (values[lower - 1] + values[lower]));
    if (depth + cell >= 1) {
      const double missing = (1 - depth) / gridStep, whole = cell / gridStep;
      double c[6], part = missing / whole;
      for (int p = 0; p < 6; p++) {
        c[p] = 0;
        for (int j = 0; j < 6; j++) c[p] += cellPolynomial[6 * p + j] * values[lower + 2 - j];
      }
      for (int k = 0; k < 4; k++) {
        double integral = 0, slope = 0;
        for (int p = 5; p >= 0; p--) {
          integral = integral * part + c[p] / (p + 1);
          slope = slope * part + c[p];
        }
        part -= (integral * part - missing) / slope;
      }
      const double s = gridStep * part;
      out->lower = lower;
      out->part = part;
      out->temperature = temperatures[lower] * (1 + s * (1 + s / 2 * (1 + s / 3 * (1 + s / 4 * (1 + s / 5)))));
      return;
    }
    depth += cell;
  }
}

static void depths(const Row *row, Crossing *star, Crossing *dragged) {
  const double scale = row->scattering / (photonTemperature * photonTemperature * photonTemperature);
  const double perLoading = 1 / (row->loading * photonTemperature), lastTemperature = temperatures[gridSize - 1];
  const double logLast = mainTop - gridStep * gridPlaces[gridSize - 1];
  const double lastStep = gridStep * (gridPlaces[gridSize - 1] - gridPlaces[gridSize - 2]);
  double photon = 0, drag = 0, here = 1, above = 1;
  for (int i = searchEnd - 3; i < searchStart + 3; i++) {
    const double t = temperatures[i];
    rate[i] = scale * t * t * t * ionized[i] * inverseRate[i];
    dragRate[i] = rate[i] * t * perLoading;
  }
  for (int i = searchStart - 2; i < searchStart + 3; i++) {
    photon += tailWeights[i] * rate[i];
    drag += tailWeights[i] * dragRate[i];
  }
  for (int i = searchStart + 3; i < gridSize; i++) {
    const double t = temperatures[i];
    above = here;
    here = scale * t * t * t * ionized[i] * inverseRate[i];
    const double weighted = tailWeights[i] * here;
    photon += weighted;
    drag += weighted * t * perLoading;
  }
  const double t = (above - here) / (above + here), slope = 2 * t * (1 + t * t / 3) / lastStep;
  const double left = exp(slope * (logPhotonTemperature - logLast));
  photon += here / slope * (1 - left);
  drag += here * lastTemperature * perLoading / (slope + 1) * (1 - left * photonTemperature / lastTemperature);
  cross(rate, photon, star);
  cross(dragRate, drag, dragged);
}

/* ---- horizons */

enum {
  dragNodes = sizeof dragNode / sizeof *dragNode,
  fixedNodes = sizeof fixedNode / sizeof *fixedNode,
  dragBegin = earlyNodes,
  fixedBegin = dragBegin + dragNodes,
  lateBegin = fixedBegin + fixedNodes,
  nodeCount = lateBegin + lateNodes
};

static double node[nodeCount], nodeLog[nodeCount], nodeWeight[nodeCount], term[nodeCount];

typedef struct {
  double sound, light, time;
} Sums;

static void setShort(int begin, int count, const double *nodes, const double *weights, double star, double to,
                     double logStar) {
  const double half = (to - star) / 2;
  for (int i = 0; i < count; i++) {
    const double way = half * (1 + nodes[i]), a = star + way, t = way / (star + a), s = t * t;
    node[begin + i] = a;
    nodeLog[begin + i] = logStar + 2 * t * (1 + s * (1.0 / 3 + s * (1.0 / 5 + s * (1.0 / 7))));
    nodeWeight[begin + i] = half * weights[i];
  }
}

static Sums add(const Row *row, Sums sums, int from, int to) {
  for (int i = from; i < to; i++) {
    const double a = node[i], part = nodeWeight[i] / sqrt(term[i]);
    sums.light += part;
    sums.time += part * a;
    sums.sound += part / sqrt(3 * (1 + row->loading * a));
  }
  return sums;
}

static void horizons(const Row *row, double star, double drag, double *out) {
  const double logStar = log(star);
  Sums sums = {0, 0, 0};
  for (int i = 0; i < earlyNodes; i++) {
    node[i] = star * earlyNode[i];
    nodeLog[i] = logStar + earlyLog[i];
    nodeWeight[i] = star * earlyWeight[i];
  }
  setShort(dragBegin, dragNodes, dragNode, dragWeight, star, drag, logStar);
  setShort(fixedBegin, fixedNodes, fixedNode, fixedWeight, star, fixedStart, logStar);
  fillSquaredTerms(row, node, nodeLog, term, 0, nodeCount);
  sums = add(row, sums, 0, dragBegin);
  const double timeAtStar = sums.time;
  out[2] = unitDistance * sums.sound;
  sums = add(row, sums, dragBegin, fixedBegin);
  out[3] = unitDistance * sums.sound;
  sums = add(row, (Sums){0, 0, 0}, fixedBegin, nodeCount);
  const double along = unitDistance * sums.light, radius = row->reducedHubble / unitDistance;
  const double k = -row->curvature * radius * radius, q = k * along * along, root = sqrt(fabs(k));
  const double across = fabs(q) < 1e-3 ? along * (1 - q / 6 * (1 - q / 20 * (1 - q / 42)))
                                       : (k > 0 ? sin(root * along) : sinh(root * along)) / root;
  out[4] = 100 * out[2] / fabs(across);
  out[6] = unitTime * (timeAtStar + sums.time);
}

/* ---- damping */

static void fillIntegrand(const Row *row, int first, int end) {
  const double scale = 1 / photonTemperature, loading = row->loading;
  for (int i = first; i < end; i++) {
    const double x = temperatures[i] * scale, sum = x + loading;
    integrand[i] = (loading * loading + 16.0 / 15 * x * sum) * inverseRate[i] / (sum * sum * x * ionized[i]);
  }
}

static double integral(int upper, int lower) {
  double sum = 0;
  for (int i = upper; i <= lower; i++) sum += integrand[i];
  for (int j = 0; j < 6; j++)
    sum += (edgeWeights[j] / 1440 - (j < 2 ? 0 : 1)) * (integrand[lower + 2 - j] + integrand[upper - 2 + j]);
  return sum;
}

static double damping(const Row *row, const Crossing *from) {
  enum { topPoint = 2, coarseJoint = heliumAtMainTop + 1, fineJoint = mainFirst + coarseStride };
  const int start = from->lower - 1;
  const double loading = row->loading, ratio = row->heliumRatio;
  double partial = 0, power = from->part, above = 0;
  fillIntegrand(row, 0, coarseJoint + 3);
  fillIntegrand(row, mainFirst, start + 4);
  for (int p = 0; p < 6; p++) {
    double coefficient = 0;
    for (int j = 0; j < 6; j++) coefficient += cellPolynomial[6 * p + j] * integrand[start + 3 - j];
    partial += coefficient * (1 - power) / (p + 1);
    power *= from->part;
  }
  static double scaleFactor[hotNodes], logs[hotNodes], terms[hotNodes];
  for (int k = 0; k < hotNodes; k++) {
    scaleFactor[k] = photonTemperature / hotTemperature[k];
    logs[k] = logPhotonTemperature - hotLogTemperature[k];
  }
  fillSquaredTerms(row, scaleFactor, logs, terms, 0, hotNodes);
  for (int k = 0; k < hotNodes; k++) {
    const double a = scaleFactor[k], x = 1 / a, perDensity = a * a * a / row->hydrogenDensity;
    const double toOnce = hotOnce[k] * perDensity, toTwice = hotTwice[k] * perDensity;
    double electrons = 1 + ratio;
    for (int pass = 0; pass < 2; pass++) {
      const double first = electrons * toOnce, second = toOnce * toTwice;
      electrons = 1 + ratio * (first + 2 * second) / (electrons * electrons + first + second);
    }
    const double mixed = x + loading;
    above += hotWeight[k] * a * a * (loading * loading + 16.0 / 15 * x * mixed) /
             (sqrt(terms[k]) * mixed * mixed * x * electrons);
  }
  const double onGrid =
      gridStep * (partial + integral(fineJoint, start) + coarseStride * integral(topPoint, coarseJoint));
  return 1 / (unitDistance * sqrt((onGrid + above) / row->scattering / 6));
}

static void suite(const double *given, double *out) {
  static Row row;
  Crossing star, drag;
  closeRow(&row, given);
  fillExpansion(&row);
  marchHelium(&row);
  startHydrogen(&row);
  marchWithHelium(&row);
  for (int b = 0; b < blocks; b++) marchHydrogen(b, &row);
  depths(&row, &star, &drag);
  if (star.lower < 0 || drag.lower < 0) {
    for (int k = 0; k < 7; k++) out[k] = NAN;
    return;
  }
  out[0] = star.temperature / photonTemperature - 1;
  out[1] = drag.temperature / photonTemperature - 1;
  horizons(&row, photonTemperature / star.temperature, photonTemperature / drag.temperature, out);
  out[5] = damping(&row, &star);
}

static double processor(void) {
  struct rusage usage;
  getrusage(RUSAGE_SELF, &usage);
  return usage.ru_utime.tv_sec + usage.ru_stime.tv_sec + 1e-6 * (usage.ru_utime.tv_usec + usage.ru_stime.tv_usec);
}

static double wall(void) {
  struct timespec now;
  clock_gettime(CLOCK_MONOTONIC, &now);
  return now.tv_sec + 1e-9 * now.tv_nsec;
}

int main(int argc, char **argv) {
  if (argc != 4) return 2;
  const int count = atoi(argv[2]), rounds = atoi(argv[3]);
  double *rows = malloc(count * 10 * sizeof(double)), *out = malloc(count * 7 * sizeof(double));
  FILE *file = fopen(argv[1], "r");
  if (!file) return 2;
  for (int i = 0; i < 10 * count; i++)
    if (fscanf(file, "%lf", &rows[i]) != 1) return 2;
  fclose(file);
  logPhotonTemperature = log(photonTemperature);
  for (int i = 0; i < lateNodes; i++) {
    node[lateBegin + i] = lateNode[i];
    nodeLog[lateBegin + i] = lateLog[i];
    nodeWeight[lateBegin + i] = lateWeight[i];
  }
  for (int i = 0; i < count; i++) suite(rows + 10 * i, out + 7 * i);
  const double wallStart = wall(), processorStart = processor();
  for (int k = 0; k < rounds; k++)
    for (int i = 0; i < count; i++) suite(rows + 10 * i, out + 7 * i);
  const double wallTime = wall() - wallStart, processorTime = processor() - processorStart;
  for (int i = 0; i < count; i++)
    for (int j = 0; j < 7; j++) printf("%.17g%c", out[7 * i + j], j < 6 ? ' ' : '\n');
  printf("seconds %.9g %.9g\n", wallTime, processorTime);
  return 0;
}
