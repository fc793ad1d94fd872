/*
 * The full suite of a model, written for this benchmark as an expert writes it in C on the GNU Scientific Library: adaptive
 * Gauss-Kronrod quadrature, the BDF stepper of odeiv2, Brent's method for crossings. Nothing of the project's own method.
 *
 *   suite MODELS COUNT TOLERANCE C0 C1 C2
 *
 * MODELS: lines of hubble, omega_b, omega_c, Omega_k, w0, wa, N_eff and three masses in eV; COUNT of them are computed.
 * TOLERANCE: of the stepper. C0 to C2: coefficients of the calibrated tier. Prints z_*, z_drag, r_*, r_drag, 100 theta_*, k_D, age a line, then
 * the wall and processor seconds of the loop over models.
 */
#include <gsl/gsl_errno.h>
#include <gsl/gsl_integration.h>
#include <gsl/gsl_odeiv2.h>
#include <gsl/gsl_roots.h>
#include <gsl/gsl_spline.h>
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <sys/resource.h>
#include <time.h>

/* CODATA 2022, IAU 2012 B2 and 2015 B2, SI. */
static const double c = 299792458, G = 6.67430e-11, h = 6.62607015e-34, kB = 1.380649e-23, eV = 1.602176634e-19;
static const double me = 9.1093837139e-31, u = 1.66053906892e-27, sigmaT = 6.6524587051e-29;
static const double sigmaSB = 5.6703744191844314e-8;
static const double Mpc = 1e6 * 648000 / M_PI * 149597870700.0, Gyr = 1e9 * 31557600.0;
static const double Tcmb = 2.7255;

/* Atomic levels in 1/m, rates in 1/s, cross sections in m2. */
static const double mH = 1.0078250319, mHe = 4.002603254;
static const double LH = 10967877.174307, La = 8225916.304, LHe = 19831066.637, L2s = 16627744.0, L2p = 17113489.7;
static const double L3P = 16908684.3, LHeII = 43890887.89;
static const double twoPhotonH = 8.22458, twoPhotonHe = 51.3, As = 1.798287e9, At = 177.58;
static const double sigmaSinglet = 1.8742e-22, sigmaTriplet = 1.9381e-22;

static double fit[3];
/* 10^-16.744 and 10^-16.306 m3/s, 10^5.114 K */
static double qSinglet, qTriplet, T1;

/* Tolerances: what the benchmark is about. */
static double odeTolerance;
static const double quadTolerance = 1e-7, rootTolerance = 1e-9;
/* Where helium leaves Saha equilibrium, and hydrogen. */
static const double heliumStart = 3500, hydrogenStart = 1950;

typedef struct {
  double hubble, h2, baryons, cold, curvature, darkEnergy, w0, wa, photons, species, radiation, loading;
  int massive;
  double mass[3];   /* m c^2/(k T_nu) today */
  double nH, fHe, compton, scattering;
  gsl_spline *electrons;
  gsl_interp_accel *electronsAt;
  double top;       /* ln(1+z) to which the spline reaches */
} model;

/* ---- neutrinos: rho(y)/rho(0) as a spline in ln y, made once */

static gsl_spline *energy;
static gsl_interp_accel *energyAt;
static const double lowY = -9, highY = 9;

static double energyIntegrand(double x, void *y) {
  return x * x * sqrt(x * x + *(double *)y * *(double *)y) / (exp(x) + 1);
}

static void makeEnergy(gsl_integration_workspace *work) {
  enum { points = 1801 };
  static double x[points], f[points];
  gsl_function integrand = {energyIntegrand, NULL};
  for (int i = 0; i < points; i++) {
    double y, error;
    x[i] = lowY + (highY - lowY) * i / (points - 1);
    y = exp(x[i]);
    integrand.params = &y;
    gsl_integration_qag(&integrand, 0, 80, 0, 1e-11, 1000, GSL_INTEG_GAUSS61, work, &f[i], &error);
    f[i] /= 7 * pow(M_PI, 4) / 120;
  }
  energy = gsl_spline_alloc(gsl_interp_cspline, points);
  energyAt = gsl_interp_accel_alloc();
  gsl_spline_init(energy, x, f, points);
}

static double neutrinoEnergy(double y) {
  double l = log(y);
  if (l < lowY) return 1 + 5 / (7 * M_PI * M_PI) * y * y;
  if (l > highY) return y * 1.5 * 1.2020569031595942 / (7 * pow(M_PI, 4) / 120);
  return gsl_spline_eval(energy, l, energyAt);
}

/* ---- expansion */

/* a^4 (H/100 km/s/Mpc)^2 */
static double squared(const model *m, double a) {
  double sum = m->radiation, growth = 1;
  for (int i = 0; i < m->massive; i++) sum += m->species * neutrinoEnergy(m->mass[i] * a);
  if (m->w0 != -1 || m->wa != 0) growth = exp(-3 * (1 + m->w0 + m->wa) * log(a) - 3 * m->wa * (1 - a));
  return sum + a * (m->baryons + m->cold + a * m->curvature * m->h2) + a * a * a * a * m->darkEnergy * growth;
}

/* H in 1/s at ln(1+z) = t */
static double rate(const model *m, double t) { return 1e5 / Mpc * exp(2 * t) * sqrt(squared(m, exp(-t))); }

static void fill(model *m, const double *row) {
  const double unit = 3 * pow(1e5 / Mpc, 2) / (8 * M_PI * G), neff = row[6];
  const double Tnu = cbrt(4.0 / 11) * pow(neff / 3, 0.25) * Tcmb, radiationConstant = 4 * sigmaSB / c;
  double nu = 0, Y, w = row[1], d = neff - 3.046, r = mHe / mH / 4;
  m->hubble = row[0];
  m->h2 = row[0] * row[0] / 1e4;
  m->baryons = w;
  m->cold = row[2];
  m->curvature = row[3];
  m->w0 = row[4];
  m->wa = row[5];
  m->photons = radiationConstant * pow(Tcmb, 4) / (c * c) / unit;
  m->species = 7.0 / 8 * pow(4.0 / 11, 4.0 / 3) * neff / 3 * m->photons;
  m->massive = 0;
  for (int i = 0; i < 3; i++)
    if (row[7 + i] > 0) {
      m->mass[m->massive] = row[7 + i] * eV / (kB * Tnu);
      nu += m->species * neutrinoEnergy(m->mass[m->massive++]);
    }
  m->radiation = m->photons + (3 - m->massive) * m->species;
  m->darkEnergy = m->h2 * (1 - m->curvature) - m->baryons - m->cold - nu - m->radiation;
  Y = 0.2311 + 0.9502 * w - 11.27 * w * w + d * (0.01356 + 0.008581 * w - 0.1810 * w * w) +
      d * d * (-0.0009795 - 0.001370 * w + 0.01746 * w * w);
  Y = r * Y / (r * Y + 1 - Y);
  m->fHe = Y / (mHe / mH * (1 - Y));
  m->nH = (1 - Y) * w * unit / (mH * u);
  m->compton = 8 * sigmaT * radiationConstant * pow(Tcmb, 4) / (3 * me * c);
  m->scattering = c * sigmaT * m->nH;
  m->loading = 3 * w / (4 * m->photons);
}

/* ---- recombination */

static double states(double T) { return pow(2 * M_PI * me * kB * T / (h * h), 1.5); }

/* x_e in Saha equilibrium, and x_p and He+ a helium nucleus where wanted */
static double saha(const model *m, double t, double *hydrogen, double *once) {
  double z1 = exp(t), T = Tcmb * z1, n = m->nH * z1 * z1 * z1, hck = h * c / kB / T, s = states(T) / n;
  double sH = s * exp(-LH * hck), s1 = 4 * s * exp(-LHe * hck), s2 = s * exp(-LHeII * hck), x = 1 + m->fHe, last;
  do {
    last = x;
    double r1 = s1 / x, r2 = r1 * s2 / x, p = sH / (sH + x);
    x = p + m->fHe * (r1 + 2 * r2) / (1 + r1 + r2);
    if (hydrogen) *hydrogen = p;
    if (once) *once = r1 / (1 + r1 + r2);
  } while (fabs(x - last) > 1e-12 * x);
  return x;
}

static double escape(double A, double L, double sigma, double a, double b, const model *m, double n, double H, double T,
                     double neutral, double neutralHydrogen) {
  double strength = 3 * A * m->fHe * neutral, nu = c * L;
  double tau = strength * n / (8 * M_PI * H * L * L * L), D = nu * sqrt(2 * kB * T / (mHe * u * c * c));
  double g = strength * c * c / (8 * pow(M_PI, 1.5) * sigma * nu * nu * D * neutralHydrogen);
  return -expm1(-tau) / tau + 1 / (1 + a * pow(g, b));
}

static double recombinationHelium(double T, double q, double p) {
  double s1 = sqrt(T / T1), s2 = sqrt(T / 3);
  return q / (s2 * pow(1 + s2, 1 - p) * pow(1 + s1, 1 + p));
}

/* d ln[y/(1-y)]/ds at v = ln[y/(1-y)] */
static double heliumRate(const model *m, double v, double xe, double neutral, double n, double H, double T) {
  double hck = h * c / kB / T, g = states(T), odds = exp(v);
  double as = recombinationHelium(T, qSinglet, 0.711), at = recombinationHelium(T, qTriplet, 0.761);
  double bs = 4 * as * g * exp(-(LHe - L2s) * hck), bt = 4.0 / 3 * at * g * exp(-(LHe - L3P) * hck);
  double net = xe * n * (1 + odds) - 4 * g * exp(-LHe * hck) * (1 + 1 / odds), left = 1 / (1 + odds);
  double X = 3 * As * escape(As, L2p, sigmaSinglet, 0.36, 0.86, m, n, H, T, left, neutral) * exp(-(L2p - L2s) * hck) +
             twoPhotonHe;
  /* One exponential for both of b_t and its escape, which underflow late. */
  double Z = At * escape(At, L3P, sigmaTriplet, 0.66, 0.9, m, n, H, T, left, neutral);
  /* Once fewer than 1e-13 of its atoms are ionized, helium is let be, smoothly: nothing sees it fall further. */
  return -net * (as * X / (X + bs) + at / (1 + bt / Z)) / H * odds / (odds + 1e-13);
}

/* x_p in Saha equilibrium while helium is as it is, and 1 - x_p. */
static double hydrogenShare(const model *m, double v, double n, double T, double *neutral) {
  double s = states(T) * exp(-LH * h * c / kB / T) / n, helium = m->fHe / (1 + exp(-v)), b = s + helium;
  double x = 2 * s / (b + sqrt(b * b + 4 * s));
  *neutral = x * (x + helium) / s;
  return x;
}

/* Helium alone: ln[y/(1-y)] over s = -ln(1+z). Hydrogen is in Saha equilibrium and the gas as hot as the radiation. */
static int earlyDerivative(double s, const double *state, double *out, void *params) {
  const model *m = params;
  double z1 = exp(-s), n = m->nH * z1 * z1 * z1, neutral, x = hydrogenShare(m, state[0], n, Tcmb * z1, &neutral);
  *out = heliumRate(m, state[0], x + m->fHe / (1 + exp(-state[0])), neutral, n, rate(m, -s), Tcmb * z1);
  return GSL_SUCCESS;
}

/*
 * State over s = -ln(1+z): w = ln[x_p/(1-x_p)], v = ln[y/(1-y)], T_m/T_r. The logarithms keep both ends of a share, no share can
 * leave 0 to 1, and a tolerance on a logarithm is one on the share.
 */
static int derivative(double s, const double *state, double *out, void *params) {
  const model *m = params;
  double z1 = exp(-s), T = Tcmb * z1 * state[2], n = m->nH * z1 * z1 * z1, H = rate(m, -s), hck = h * c / kB / T;
  double odds = exp(state[0]), neutral = 1 / (1 + odds), xe = odds * neutral + m->fHe / (1 + exp(-state[1]));
  double th = T / 1e4, g = states(T), d = log(z1 / 1090);
  double alpha = 1.14e-19 * 4.309 * pow(th, -0.6166) / (1 + 0.6703 * pow(th, 0.5300));
  double beta = alpha * g * exp(-(LH - La) * hck);
  double K = (1 + (fit[0] + d * (fit[1] + d * fit[2])) * exp(-d * d / 0.16)) / (8 * M_PI * H * La * La * La);
  double C = (1 + K * twoPhotonH * n * neutral) / (1 + K * (twoPhotonH + beta) * n * neutral);
  out[0] = -C * alpha * (xe * n * (1 + odds) - g * exp(-LH * hck) * (1 + 1 / odds)) / H;
  out[1] = heliumRate(m, state[1], xe, neutral, n, H, T);
  out[2] = -m->compton * pow(z1, 4) * xe / (1 + m->fHe + xe) * (state[2] - 1) / H - state[2];
  return GSL_SUCCESS;
}

/* By differences; the stepper of backward differences never reads df/ds. */
static void differences(int (*f)(double, const double *, double *, void *), int size, double s, const double *state,
                        double *dfdy, double *dfds, void *params) {
  const double step = 1e-5;
  double base[3], moved[3], there[3];
  f(s, state, base, params);
  for (int j = 0; j < size; j++) {
    for (int k = 0; k < size; k++) moved[k] = state[k];
    moved[j] += step;
    f(s, moved, there, params);
    for (int k = 0; k < size; k++) dfdy[size * k + j] = (there[k] - base[k]) / step;
    dfds[j] = 0;
  }
}

static int earlyJacobian(double s, const double *state, double *dfdy, double *dfds, void *params) {
  differences(earlyDerivative, 1, s, state, dfdy, dfds, params);
  return GSL_SUCCESS;
}

static int jacobian(double s, const double *state, double *dfdy, double *dfds, void *params) {
  differences(derivative, 3, s, state, dfdy, dfds, params);
  return GSL_SUCCESS;
}

/* Steps in ln(1+z) between the points of the spline of x_e. */
static const double largestStep = 0.008, smallestStep = 0.003;
/* What the limits on a step allow. */
enum { mostPoints = 4000 };

static double pointT[mostPoints], pointX[mostPoints];
static int points;

typedef struct {
  gsl_odeiv2_system system;
  gsl_odeiv2_step *step;
  gsl_odeiv2_control *control;
  gsl_odeiv2_evolve *evolve;
} stepper;

static stepper early, late;

static void prepare(stepper *k, gsl_odeiv2_system system) {
  k->system = system;
  k->step = gsl_odeiv2_step_alloc(gsl_odeiv2_step_msbdf, system.dimension);
  k->control = gsl_odeiv2_control_standard_new(odeTolerance, 0, 1, 0);
  k->evolve = gsl_odeiv2_evolve_alloc(system.dimension);
  /* The stepper asks its driver for the tolerances. */
  gsl_odeiv2_step_set_driver(k->step, gsl_odeiv2_driver_alloc_standard_new(&k->system, gsl_odeiv2_step_msbdf, 1e-4,
                                                                           odeTolerance, 0, 1, 0));
}

static double electronsOf(const model *m, double t, const double *state, int size) {
  double z1 = exp(t), neutral;
  if (size == 1)
    return hydrogenShare(m, state[0], m->nH * z1 * z1 * z1, Tcmb * z1, &neutral) + m->fHe / (1 + exp(-state[0]));
  return 1 / (1 + exp(-state[0])) + m->fHe / (1 + exp(-state[1]));
}

/* From -ln(1+z) = s to `end`, points of the spline on the way. */
static void march(model *m, stepper *k, double s, double end, double *state) {
  double size = 1e-4;
  int restarts = 0;
  k->system.params = m;
  gsl_odeiv2_step_reset(k->step);
  gsl_odeiv2_evolve_reset(k->evolve);
  while (s < end) {
    /* A step no longer than what the spline through the steps bears. */
    if (size > largestStep && s < -6) size = largestStep;
    if (gsl_odeiv2_evolve_apply(k->evolve, k->control, k->step, &k->system, &s, end, &size, state) != GSL_SUCCESS) {
      /* Rarely the stepper loses its way and asks for no step at all; from anew it goes on. */
      if (++restarts > 20) {
        fprintf(stderr, "the stepper failed at z = %g\n", expm1(-s));
        exit(1);
      }
      gsl_odeiv2_step_reset(k->step);
      gsl_odeiv2_evolve_reset(k->evolve);
      size = 1e-4;
      continue;
    }
    /* Restarts of the stepper crowd steps together; a spline through such points swings. */
    if (s < end && pointT[points - 1] + s < smallestStep) continue;
    pointX[points] = electronsOf(m, -s, state, k->system.dimension);
    pointT[points++] = -s;
  }
}

/* x_e as a spline: helium alone first, then all three equations. */
static void recombine(model *m) {
  static double reversedT[mostPoints], reversedX[mostPoints];
  const double start = -log(1 + heliumStart), join = -log(1 + hydrogenStart), z1 = 1 + hydrogenStart;
  double helium, state[3], x, neutral;
  m->top = -start;
  points = 1;
  pointX[0] = saha(m, -start, NULL, &helium);
  pointT[0] = -start;
  state[1] = log(helium / (1 - helium));
  march(m, &early, start, join, &state[1]);
  x = hydrogenShare(m, state[1], m->nH * z1 * z1 * z1, Tcmb * z1, &neutral);
  state[0] = log(x / neutral);
  state[2] = 1;
  march(m, &late, join, 0, state);
  for (int i = 0; i < points; i++) {
    reversedT[i] = pointT[points - 1 - i];
    reversedX[i] = pointX[points - 1 - i];
  }
  reversedT[0] = 0;
  m->electrons = gsl_spline_alloc(gsl_interp_cspline, points);
  gsl_interp_accel_reset(m->electronsAt);
  gsl_spline_init(m->electrons, reversedT, reversedX, points);
}

/* ---- last scattering */

static double electrons(const model *m, double t) {
  return t > m->top ? saha(m, t, NULL, NULL) : gsl_spline_eval(m->electrons, t, m->electronsAt);
}

/* dtau/dt */
static double scattering(double t, void *params) {
  const model *m = params;
  return m->scattering * exp(3 * t) * electrons(m, t) / rate(m, t);
}

static double dragging(double t, void *params) {
  return scattering(t, params) * exp(t) / ((model *)params)->loading;
}

static gsl_integration_workspace *work;

static double quad(double (*f)(double, void *), double from, double to, const model *m) {
  gsl_function function = {f, (void *)m};
  double value, error;
  gsl_integration_qag(&function, from, to, 0, quadTolerance, 1000, GSL_INTEG_GAUSS21, work, &value, &error);
  return value;
}

typedef struct {
  const model *m;
  double (*f)(double, void *);
  double from, below;
} crossing;

static double missing(double t, void *params) {
  const crossing *k = params;
  return k->below + quad(k->f, k->from, t, k->m) - 1;
}

/* ln(1+z) at which a depth is one */
static double cross(double (*f)(double, void *), const model *m) {
  const double from = log(801), to = log(1601);
  crossing k = {m, f, from, quad(f, 0, from, m)};
  gsl_function function = {missing, &k};
  gsl_root_fsolver *solver = gsl_root_fsolver_alloc(gsl_root_fsolver_brent);
  double root;
  gsl_root_fsolver_set(solver, &function, from, to);
  do {
    gsl_root_fsolver_iterate(solver);
    root = gsl_root_fsolver_root(solver);
  } while (gsl_root_test_interval(gsl_root_fsolver_x_lower(solver), gsl_root_fsolver_x_upper(solver), rootTolerance, 0) ==
           GSL_CONTINUE);
  gsl_root_fsolver_free(solver);
  return root;
}

/* ---- integrals over the background */

static double sound(double a, void *params) {
  const model *m = params;
  return 1 / sqrt(3 * (1 + m->loading * a) * squared(m, a));
}

static double light(double t, void *params) { return exp(-t) / sqrt(squared(params, exp(-t))); }

static double timeOf(double a, void *params) { return a / sqrt(squared(params, a)); }

static double diffusion(double t, void *params) {
  const model *m = params;
  double R = m->loading * exp(-t), horizon = exp(-t) / sqrt(squared(m, exp(-t)));
  return horizon * horizon * (R * R + 16 * (1 + R) / 15) / ((1 + R) * (1 + R)) / scattering(t, params);
}

static void suite(const double *row, double *out, gsl_interp_accel *accel) {
  const double distance = c / 1e5, age = Mpc / 1e5 / Gyr;
  model m;
  m.electronsAt = accel;
  fill(&m, row);
  recombine(&m);
  double star = cross(scattering, &m), drag = cross(dragging, &m);
  double along = distance * quad(light, 0, star, &m), k = sqrt(fabs(m.curvature) * m.h2) / distance;
  if (m.curvature > 0) along = sinh(k * along) / k;
  if (m.curvature < 0) along = sin(k * along) / k;
  out[0] = expm1(star);
  out[1] = expm1(drag);
  out[2] = distance * quad(sound, 0, exp(-star), &m);
  out[3] = distance * quad(sound, 0, exp(-drag), &m);
  out[4] = 100 * out[2] / along;
  out[5] = 1 / (distance * sqrt((quad(diffusion, star, m.top, &m) + quad(diffusion, m.top, m.top + 10, &m)) / 6));
  out[6] = age * quad(timeOf, 0, 1, &m);
  gsl_spline_free(m.electrons);
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
  if (argc != 7) return 2;
  const int count = atoi(argv[2]);
  double *rows = malloc(count * 10 * sizeof(double)), *out = malloc((count + 1) * 7 * sizeof(double));
  FILE *file = fopen(argv[1], "r");
  if (!file) return 2;
  for (int i = 0; i < 10 * count; i++)
    if (fscanf(file, "%lf", &rows[i]) != 1) return 2;
  fclose(file);
  for (int i = 0; i < 3; i++) fit[i] = atof(argv[4 + i]);
  odeTolerance = atof(argv[3]);

  qSinglet = pow(10, -16.744);
  qTriplet = pow(10, -16.306);
  T1 = pow(10, 5.114);
  work = gsl_integration_workspace_alloc(1000);
  makeEnergy(work);
  prepare(&early, (gsl_odeiv2_system){earlyDerivative, earlyJacobian, 1, NULL});
  prepare(&late, (gsl_odeiv2_system){derivative, jacobian, 3, NULL});
  gsl_interp_accel *accel = gsl_interp_accel_alloc();
  suite(rows, out, accel);
  double wallStart = wall(), processorStart = processor();
  for (int i = 0; i < count; i++) suite(rows + 10 * i, out + 7 * i, accel);
  double wallTime = wall() - wallStart, processorTime = processor() - processorStart;
  for (int i = 0; i < count; i++)
    for (int j = 0; j < 7; j++) printf("%.17g%c", out[7 * i + j], j < 6 ? ' ' : '\n');
  printf("seconds %.9g %.9g\n", wallTime, processorTime);
  return 0;
}
