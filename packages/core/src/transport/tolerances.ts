/** Eigenvalues of a state closer than x, relative, share a second derivative of the mean in the curvature of an action. */
export const CLOSE_SPREAD = 1e-3;

/** |log(x/y)| below which the second derivative of the logarithmic mean is summed as a series. */
export const SERIES_CURVATURE = 2;

/** Newton iterations on a discretised transport action; ten are typical. */
export const ACTION_ITERATIONS = 150;

/** Newton decrement, relative to the action, at which a path counts as minimal. */
export const ACTION_DECREMENT = 1e-15;

/** Share of the decrease predicted by the slope that a step must reach, and halvings of a step at most. */
export const ACTION_ARMIJO = 0.1;
export const ACTION_HALVINGS = 3;

/** Damping of Newton steps that leave the faithful states, relative to the action: the first, the last, and what it grows by. */
export const ACTION_DAMPING = { least: 1e-6, most: 1e3, factor: 10 } as const;

/** Raises of the diagonal of the action's Hessian, relative, tried in turn until it has a Cholesky factor. */
export const ACTION_RIDGES = [0, 1e-12, 1e-9, 1e-6, 1e-3, 1] as const;

/** Multiple of D·2⁻⁵² taken as the relative error of a metric matrix, a gradient of the metric, and sums over them. */
export const METRIC_ROUNDING = 256;

/** A straight piece from the boundary of state space is cut at powers of the ratio, this many times. */
export const BOUNDARY_RATIO = 0.84;
export const BOUNDARY_PARTS = 130;

/** Newton steps, and halvings of one, towards the best supporting state of a dual bound; the ridge of its Hessian, relative. */
export const DUAL_STEPS = 8;
export const DUAL_HALVINGS = 30;
export const DUAL_RIDGE = 1e-9;

/** Pieces of the coarsest and the finest path of a distance, and parts into which each is cut for its bounds. */
export const DISTANCE_COARSEST = 8;
export const DISTANCE_FINEST = 1024;
export const DISTANCE_PARTS = 4;

/** Multiple of 2⁻⁵² by which the derivative of a potential, times its share of time, may be off, relative to the potential. */
export const SLOPE_ROUNDING = 8;

/** Share of the width asked for that the search for supporting states may leave. */
export const DUAL_SHARE = 0.02;

/** How far a first path between states that are not faithful is bent towards their projection. */
export const BENT_PATH = 0.3;

/** Largest dimension of an algebra for transport distances; of a commutative one. */
export const TRANSPORT_LIMIT = 64;
export const CHAIN_TRANSPORT_LIMIT = 256;

/** Eigenvalue of a state below which it is treated as one on the boundary of state space. */
export const BOUNDARY_EIGENVALUE = 1e-12;

/** Smallest eigenvalue of an end state below which the first path has nodes closer together there. */
export const GRADED_BELOW = 1e-2;

/** A straight piece is cut when the action at one end is this much larger than at the other. */
export const STEEP_PIECE = 2;

/** Estimated errors, in units of the gap, at which the mesh of a comparison is fine enough, and its most pieces. */
export const COMPARISON_ACCURACY = { random: 1e-3, short: 1e-5 } as const;
export const COMPARISON_FINEST = 128;

/** Times of a trajectory at which the evolution variational inequality is looked at, in units of 1/gap. */
export const COMPARISON_TIMES = [0, 0.5, 1.5] as const;

/** Standard deviation of the coordinates of log ρ for the random states of a comparison. */
export const COMPARISON_SPREAD = 1;

/** Share of the way to the boundary that a short geodesic through a witness goes on each side. */
export const WITNESS_REACH = 0.1;

/** Time of the contraction inequality in units of 1/gap; relative width of the distances in inequalities; their rounding. */
export const CONTRACTION_TIME = 0.5;
export const INEQUALITY_WIDTH = 1e-3;
export const INEQUALITY_ROUNDING = 1e-12;

/** Witnesses of ge within this of the lowest, relative to the larger of 1 and it, are tied for the start of a comparison. */
export const WITNESS_TIE = 1e-9;
