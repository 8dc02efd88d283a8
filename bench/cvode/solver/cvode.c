/*
 * The creep of one material point integrated by a general-purpose stiff solver: SUNDIALS CVODE, BDF with a dense matrix.
 * This is what a user would otherwise wire up; run.sh builds it and compares it with package integrate at equal achieved error.
 *
 * Unknowns: six creep strains (tensor shear) and the equivalent creep strain. sigma = C : (strain(t) - creep), isotropic;
 * d creep/dt = 3/2 rate s/mises. Strain is linear in time between knots; the solver restarts at each knot.
 *
 * Kept as fast as the method allows: memory is made once and reinitialised, the analytic Jacobian is given (and, as a second
 * column, left to the solver's differences), the creep rate takes one pow().
 *
 * Output, CSV: history, jacobian, relative tolerance, achieved error (largest stress error at any knot over the stress scale),
 * nanoseconds per history, steps per history.
 */
#define _POSIX_C_SOURCE 200809L
#include <cvode/cvode.h>
#include <math.h>
#include <nvector/nvector_serial.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <sundials/sundials_context.h>
#include <sunlinsol/sunlinsol_dense.h>
#include <sunmatrix/sunmatrix_dense.h>
#include <time.h>

#define COUNT 7
#define KNOTS 64

typedef struct {
	const char *name;
	int knots;
	double time[KNOTS];
	double strain[KNOTS][6];
	double scale; /* stress the errors are measured by */
} History;

typedef struct {
	double lame, shear, prefactor, exponent;
	const History *history;
	int segment;
} Problem;

/* Deviatoric trial stress, its von Mises stress and the mean at time t. */
static double stress(const Problem *p, double t, const double *y, double *s, double *mean) {
	const History *h = p->history;
	int k = p->segment;
	double part = (t - h->time[k]) / (h->time[k + 1] - h->time[k]);
	double e[6], sum = 0;
	for (int i = 0; i < 6; i++) {
		e[i] = h->strain[k][i] + part * (h->strain[k + 1][i] - h->strain[k][i]) - y[i];
		if (i < 3)
			sum += e[i];
	}
	double square = 0;
	for (int i = 0; i < 6; i++) {
		s[i] = 2 * p->shear * (i < 3 ? e[i] - sum / 3 : e[i]);
		square += (i < 3 ? 1 : 2) * s[i] * s[i];
	}
	*mean = (p->lame + 2 * p->shear / 3) * sum;
	return sqrt(1.5 * square);
}

static int rate(realtype t, N_Vector yv, N_Vector dv, void *data) {
	Problem *p = data;
	double s[6], mean, *d = N_VGetArrayPointer(dv);
	double mises = stress(p, t, N_VGetArrayPointer(yv), s, &mean);
	double per = p->prefactor * pow(mises, p->exponent - 1);
	for (int i = 0; i < 6; i++)
		d[i] = 1.5 * per * s[i];
	d[6] = per * mises;
	return 0;
}

static int jacobian(realtype t, N_Vector yv, N_Vector fv, SUNMatrix J, void *data, N_Vector a, N_Vector b, N_Vector c) {
	(void)fv, (void)a, (void)b, (void)c;
	Problem *p = data;
	double s[6], mean;
	double mises = stress(p, t, N_VGetArrayPointer(yv), s, &mean);
	if (mises == 0)
		return 0; /* the matrix comes zeroed */
	double per = p->prefactor * pow(mises, p->exponent - 1);
	double along = 1.5 * per * (p->exponent - 1) / (mises * mises);
	for (int j = 0; j < 6; j++) {
		/* d s_i/d y_j = -2G (delta_ij - 1/3 for normal pairs); d mises/d y_j = -3G w_j s_j/mises */
		double misesBy = -3 * p->shear * (j < 3 ? 1 : 2) * s[j]; /* times 1/mises, taken below */
		for (int i = 0; i < 6; i++) {
			double deviator = -2 * p->shear * ((i == j) - (i < 3 && j < 3 ? 1.0 / 3 : 0));
			SM_ELEMENT_D(J, i, j) = 1.5 * per * deviator + along * s[i] * misesBy;
		}
		SM_ELEMENT_D(J, 6, j) = p->exponent * per * misesBy / mises;
	}
	return 0;
}

static void check(int flag, const char *what) {
	if (flag < 0) {
		fprintf(stderr, "%s failed: %d\n", what, flag);
		exit(1);
	}
}

typedef struct {
	SUNContext context;
	N_Vector y;
	SUNMatrix matrix;
	SUNLinearSolver solver;
	void *memory;
	Problem problem;
} Solver;

static void make(Solver *s, int analytic) {
	check(SUNContext_Create(NULL, &s->context), "context");
	s->y = N_VNew_Serial(COUNT, s->context);
	s->matrix = SUNDenseMatrix(COUNT, COUNT, s->context);
	s->solver = SUNLinSol_Dense(s->y, s->matrix, s->context);
	s->memory = CVodeCreate(CV_BDF, s->context);
	N_VConst(0, s->y);
	check(CVodeInit(s->memory, rate, 0, s->y), "init");
	check(CVodeSetUserData(s->memory, &s->problem), "data");
	check(CVodeSStolerances(s->memory, 1e-6, 1e-12), "tolerances");
	check(CVodeSetLinearSolver(s->memory, s->solver, s->matrix), "linear solver");
	check(CVodeSetMaxNumSteps(s->memory, 1000000), "steps");
	if (analytic)
		check(CVodeSetJacFn(s->memory, jacobian), "jacobian");
}

/* Runs the history and leaves six stresses per knot. Returns the steps taken. */
static long run(Solver *s, const History *h, double relative, double out[KNOTS][6]) {
	long steps = 0, count;
	s->problem.history = h;
	N_VConst(0, s->y);
	/* The absolute tolerance is the same error expressed in creep strain: the elastic strain of the stress scale. */
	check(CVodeSStolerances(s->memory, relative, relative * h->scale / (3 * s->problem.shear)), "tolerances");
	for (int k = 0; k + 1 < h->knots; k++) {
		realtype t = h->time[k];
		s->problem.segment = k;
		check(CVodeReInit(s->memory, t, s->y), "reinit");
		check(CVodeSetStopTime(s->memory, h->time[k + 1]), "stop");
		check(CVode(s->memory, h->time[k + 1], s->y, &t, CV_NORMAL), "integrate");
		check(CVodeGetNumSteps(s->memory, &count), "count");
		steps += count;
		double d[6], mean;
		stress(&s->problem, h->time[k + 1], N_VGetArrayPointer(s->y), d, &mean);
		for (int i = 0; i < 6; i++)
			out[k + 1][i] = d[i] + (i < 3 ? mean : 0);
	}
	return steps;
}

static double now(void) {
	struct timespec t;
	clock_gettime(CLOCK_MONOTONIC, &t);
	return 1e9 * (double)t.tv_sec + (double)t.tv_nsec;
}

/* Best of several batches, in nanoseconds per history: the machine may be busy. */
static double timed(Solver *s, const History *h, double relative) {
	double out[KNOTS][6], best = 1e300;
	for (int batch = 0; batch < 7; batch++) {
		int repeats = 20;
		double start = now();
		for (int i = 0; i < repeats; i++)
			run(s, h, relative, out);
		double each = (now() - start) / repeats;
		if (each < best)
			best = each;
	}
	return best;
}

/* Reads the histories written by the Go side, so that both integrate the same problem to the last bit. */
static int read_histories(FILE *f, History *h, int most, Problem *p) {
	int count = 0;
	if (fscanf(f, "%lf %lf %lf %lf", &p->lame, &p->shear, &p->prefactor, &p->exponent) != 4)
		return 0;
	char name[64];
	while (count < most && fscanf(f, "%63s %d %lf", name, &h[count].knots, &h[count].scale) == 3) {
		History *x = &h[count++];
		x->name = strdup(name);
		if (x->knots < 2 || x->knots > KNOTS)
			return 0;
		for (int k = 0; k < x->knots; k++) {
			double *e = x->strain[k];
			if (fscanf(f, "%lf %lf %lf %lf %lf %lf %lf", &x->time[k], e, e + 1, e + 2, e + 3, e + 4, e + 5) != 7)
				return 0;
		}
	}
	return count;
}

/* With a second argument: prints the stresses at the knots at that relative tolerance, for a comparison of the two codes. */
static void show(Solver *s, const History *h, int count, double relative) {
	double out[KNOTS][6];
	for (int i = 0; i < count; i++) {
		run(s, &h[i], relative, out);
		for (int k = 1; k < h[i].knots; k++) {
			printf("%s %d", h[i].name, k);
			for (int c = 0; c < 6; c++)
				printf(" %.17g", out[k][c]);
			printf("\n");
		}
	}
}

int main(int argc, char **argv) {
	static History histories[16];
	Problem problem;
	FILE *f = argc > 1 ? fopen(argv[1], "r") : NULL;
	int count = f ? read_histories(f, histories, 16, &problem) : 0;
	if (count == 0) {
		fprintf(stderr, "usage: cvode HISTORIES [TOLERANCE]\n");
		return 2;
	}
	Solver solvers[2];
	for (int analytic = 0; analytic < 2; analytic++) {
		make(&solvers[analytic], analytic);
		solvers[analytic].problem = problem;
	}
	if (argc > 2) {
		show(&solvers[1], histories, count, atof(argv[2]));
		return 0;
	}
	printf("history,jacobian,tolerance,error,nanoseconds,steps\n");
	for (int i = 0; i < count; i++) {
		double exact[KNOTS][6], out[KNOTS][6];
		run(&solvers[1], &histories[i], 1e-14, exact);
		for (int analytic = 0; analytic < 2; analytic++)
			for (double exponent = -2; exponent > -12.6; exponent -= 0.5) {
				double relative = pow(10, exponent), error = 0;
				long steps = run(&solvers[analytic], &histories[i], relative, out);
				for (int k = 1; k < histories[i].knots; k++)
					for (int c = 0; c < 6; c++)
						error = fmax(error, fabs(out[k][c] - exact[k][c]) / histories[i].scale);
				double each = timed(&solvers[analytic], &histories[i], relative);
				printf("%s,%s,%.3e,%.3e,%.0f,%ld\n", histories[i].name, analytic ? "analytic" : "differences", relative, error,
				       each, steps);
			}
	}
	return 0;
}
