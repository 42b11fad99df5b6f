/* Times CVODE (BDF, dense Newton, roots) on the parts of a reference circuit; the equations are in the generated equations.h.
 * Usage: cvode ROUNDS RTOL; prints {"seconds": [...], "ends": [...]}, processor time of the whole. */
#include <cvode/cvode.h>
#include <math.h>
#include <nvector/nvector_serial.h>
#include <stdio.h>
#include <stdlib.h>
#include <sunlinsol/sunlinsol_dense.h>
#include <sunmatrix/sunmatrix_dense.h>
#include <time.h>

#include "equations.h"

typedef double (*Rate)(double, const double *, double *);

static int derivative(double t, N_Vector y, N_Vector f, void *part) {
  (*(Rate *)part)(t, N_VGetArrayPointer(y), N_VGetArrayPointer(f));
  return 0;
}

static int event(double t, N_Vector y, double *g, void *part) {
  double unused[STATES];
  g[0] = (*(Rate *)part)(t, N_VGetArrayPointer(y), unused);
  return 0;
}

static int run(SUNContext context, double rtol, double *ends) {
  N_Vector y = N_VNew_Serial(STATES, context);
  for (int i = 0; i < STATES; i++) N_VGetArrayPointer(y)[i] = rest[i];
  int reached = 1;
  for (int k = 0; k < PARTS && reached; k++) {
    Rate part = rates[k];
    void *memory = CVodeCreate(CV_BDF, context);
    SUNMatrix matrix = SUNDenseMatrix(STATES, STATES, context);
    SUNLinearSolver solver = SUNLinSol_Dense(y, matrix, context);
    CVodeInit(memory, derivative, 0.0, y);
    CVodeSStolerances(memory, rtol, 1e-2 * rtol);
    CVodeSetUserData(memory, &part);
    CVodeSetLinearSolver(memory, solver, matrix);
    CVodeSetMaxNumSteps(memory, 200000);
    CVodeSetInitStep(memory, 1e-6);
    CVodeSetMaxStep(memory, 0.1);
    CVodeRootInit(memory, 1, event);
    reached = CVode(memory, longest[k], y, &ends[k], CV_NORMAL) == CV_ROOT_RETURN;
    CVodeFree(&memory);
    SUNLinSolFree(solver);
    SUNMatDestroy(matrix);
  }
  N_VDestroy(y);
  return reached;
}

int main(int count, char **words) {
  if (count != 3) return 2;
  const int rounds = atoi(words[1]);
  double ends[PARTS];
  SUNContext context;
#if SUNDIALS_VERSION_MAJOR >= 7
  SUNContext_Create(SUN_COMM_NULL, &context);
#else
  SUNContext_Create(NULL, &context);
#endif
  printf("{\"seconds\": [");
  for (int k = 0; k < rounds; k++) {
    const clock_t began = clock();
    if (!run(context, atof(words[2]), ends)) {
      fprintf(stderr, "event not reached\n");
      return 1;
    }
    printf("%s%g", k > 0 ? ", " : "", (double)(clock() - began) / CLOCKS_PER_SEC);
  }
  printf("], \"ends\": [");
  for (int k = 0; k < PARTS; k++) printf("%s%.8g", k > 0 ? ", " : "", ends[k]);
  printf("]}\n");
  SUNContext_Free(&context);
  return 0;
}
