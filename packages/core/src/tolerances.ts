/** Spacing of doubles at 1, 2⁻⁵²; every relative tolerance below is a multiple of it. */
export const EPSILON = 2 ** -52;

/** Limit on implicit QL sweeps, per eigenvalue (LAPACK's value; two are typical). */
export const QL_SWEEPS_PER_EIGENVALUE = 30;

/** Entries are rescaled before a decomposition when the largest is outside [1/x, x]: cubes stay in range. */
export const SAFE_RANGE = 1e90;

/** Residual accepted from inverse iteration, in units of n ε ‖T‖. */
export const INVERSE_ITERATION_RESIDUAL = 4;

/** Inverse iterations tried from one starting vector. */
export const INVERSE_ITERATION_STEPS = 5;

/** Step, relative to the state, of the central difference along the flow: truncation 1e-10, rounding 1e-11, both relative. */
export const FLOW_STEP = 1e-5;

/** Relative size of [X,L(A)] − L([X,A]) below which a generator counts as commuting with the unitaries of its algebra. */
export const COVARIANCE_TOLERANCE = 1e-11;

/** Searches keep every log-eigenvalue of a state within this of the largest: e^{-60} is near 1e-26, and the forms stay resolved. */
export const LOG_EIGENVALUE_RANGE = 60;

/** Eigenvalues below this, relative to the largest of the form, count as zero. */
export const KERNEL_TOLERANCE = 1e-11;

/** Non-zero eigenvalues above this, relative, are clearly non-zero; between the two a kernel is undecided and said so. */
export const KERNEL_GAP = 1e-8;

/** An alternating minimisation ends when one round gains less than this, relative to ‖Γ₂‖/‖Γ‖ + |value|. */
export const ALTERNATION_TOLERANCE = 1e-13;

/** |t| below which artanh(t)/t is summed as a series of ten terms; t^20 then stays below 1e-20. */
export const SERIES_ARTANH = 0.1;

/** |z| below which (e^z−1−z)/z² is summed as a series of seventeen terms; the rest stays below 1e-16. */
export const SERIES_PHI = 0.8;

/** |x1−x2|/(x1+x2) below which a divided difference is taken as the quadrature of a slope; six points then err below 1e-15. */
export const CLOSE_ARGUMENTS = 0.05;

/** Frequencies closer than this, relative to 1+|ω|, are one frequency. */
export const FREQUENCY_TOLERANCE = 1e-9;

/** Sufficient decrease of a line search, as a fraction of the slope at its start. */
export const WOLFE_DECREASE = 1e-4;

/** A line search ends where the slope has risen to this fraction of the slope at its start. */
export const WOLFE_CURVATURE = 0.5;

/** Evaluations of one line search at most; 2^-60 of the first step is below rounding. */
export const WOLFE_BISECTIONS = 60;

/** A line search ends when the decrease it predicts is below x·2⁻⁵² of the value. */
export const WOLFE_VISIBLE = 0.25;

/** Input that must be Hermitian, positive, of trace one, invariant or inside the algebra may miss it by this, relative to its size. */
export const INPUT_TOLERANCE = 1e-9;

/** ‖L−L^adjoint‖/‖L‖ in the weighted product below which a symmetry is held to be present; the same for the rebuilt canonical form. */
export const SYMMETRY_TOLERANCE = 1e-9;

/** Negative eigenvalues of the Choi-type matrices above −x times the largest modulus are rounding. */
export const POSITIVITY_TOLERANCE = 1e-10;

/** Energies, and Bohr frequencies, closer than x times the width of the spectrum of H (at least 1) are one. */
export const ENERGY_TOLERANCE = 1e-9;

/** Kossakowski eigenvalues below x times the largest are no jumps. */
export const JUMP_TOLERANCE = 1e-12;

/** An invariant state with smallest eigenvalue below x is not faithful, unless it is exactly diagonal and positive. */
export const FAITHFUL_TOLERANCE = 1e-13;

/** Eigenvalues of a generic element of a matrix algebra closer than x times its width belong to one minimal projection. */
export const CLUSTER_TOLERANCE = 1e-8;

/** Corners p_i Y p_j of a generic element smaller than x are zero; also the residual accepted for a span being an algebra. */
export const ALGEBRA_TOLERANCE = 1e-8;

/** A semidefinite matrix may show eigenvalues down to minus this times n ε ‖A‖ by rounding. */
export const SEMIDEFINITE_ROUNDING = 8;

/** Eigenvalues of a density matrix within x·N of zero count as zero where supports are compared. */
export const SUPPORT_TOLERANCE = 2 ** -52;

/** D(ρ‖E†ρ) below which a state is too near its projection for I/D: by the metric form the relative error is 2⁻⁵²/√D. */
export const ENTROPY_FLOOR = 1e-10;

/** The same for generators without a metric form, where I is computed with cancellation: relative error 2⁻⁵²/D. */
export const ENTROPY_FLOOR_PLAIN = 1e-5;

/** Multiple of N·2⁻⁵² taken as the error of the matrix of a state and of sums over its eigenvectors. */
export const QUOTIENT_ROUNDING = 4;

/** Floors to which the eigenvalues of a witness state are raised in turn, none first: a matrix of doubles loses small ones. */
export const WITNESS_FLOORS = [Number.MIN_VALUE, 1e-14, 1e-12, 1e-10, 1e-8, 1e-6, 1e-4];

/** A search value within this, relative, of the gap is the limit towards the projection, and the gap is printed instead. */
export const GAP_CLOSENESS = 1e-9;

/** Dimension of M ⊗ M_k above which entropy constants are not searched over all of state space. */
export const ENTROPY_SEARCH_LIMIT = 1024;

/** Dimension of M above which a search start along the gap's eigenvector is left out. */
export const GAP_START_LIMIT = 400;

/** Limit on sweeps of one-sided Jacobi rotations; below ten are typical. */
export const JACOBI_SWEEPS = 40;

/** Entries of a triangular factor below this, relative to the largest, are dropped before its singular values are sought. */
export const SVD_FLUSH = 1e-150;

/** A least-squares column counts as dependent when what is left of it is below this times ε max(m, n) of the largest. */
export const LEAST_SQUARES_RANK = 4;

/** Limit on double QR steps per eigenvalue of a general real matrix (EISPACK's value). */
export const QR_STEPS_PER_EIGENVALUE = 30;

/** Largest ‖tL‖ of one Taylor step of an exponential's action: larger steps lose digits to cancellation. */
export const TAYLOR_STEP_NORM = 2;

/** Floors tried for the eigenvalues of a witness state written as a matrix of doubles; below the second nothing is resolved. */
export const STATE_FLOORS = [0, 1e-14, 1e-13, 1e-12, 1e-11, 1e-10, 1e-9, 1e-8] as const;

/** Relative residual below which a theorem's hypothesis on the form of a generator counts as met. */
export const RULE_TOLERANCE = 1e-11;

/** Lanczos stops when the residual of the wanted pair is below this, relative to the largest Ritz value. */
export const LANCZOS_TOLERANCE = 1e-10;

/** Eigenvalues of −L below this times the largest rate count as zero in a matrix-free search. */
export const FIXED_POINT_TOLERANCE = 1e-9;

/** Side of the eigenvalue problem, D times the largest block, above which the comparison with id − E is not attempted. */
export const COMPARISON_LIMIT = 600;

/** A bracket narrower than this, relative, is closed: its ends agree to the digits shown. */
export const CLOSED_TOLERANCE = 1e-8;

/** Lower ends may exceed upper ones by this, relative, before the order of a sheet counts as violated. */
export const ORDER_TOLERANCE = 1e-9;

/** A vector of which at least this part is left by a projection is orthogonal to rounding; below, it is projected once more. */
export const REORTHOGONALISE = 0.717;

/** A Krylov space counts as exhausted when the next direction is below this times ε ‖A‖ √dimension. */
export const KRYLOV_BREAKDOWN = 8;

/** Algebra dimension up to which the generator is held as a D×D matrix; above it only the matrix-free gap is given. */
export const DENSE_LIMIT = 1024;

/** Largest D·max n_b for which Γ and Γ₂ are formed. */
export const FORM_LIMIT = 600;

/** Algebra dimension up to which searches over states are run. */
export const SEARCH_LIMIT = 100;

/** Products with at least this many multiplications, and a left factor at least this dense, take the packed path. */
export const PACKED_PRODUCT_SIZE = 512;
export const PACKED_PRODUCT_DENSITY = 0.25;

/** A rate below x·‖L‖, computed as the square of a jump's entry, is the square of a rounding error. */
export const NOISE_RATE = EPSILON * EPSILON;

/** The maximally mixed state is invariant when ‖L†(1)‖ is below x·N·2⁻⁵²·‖L‖·‖1‖. */
export const STATE_ROUNDING = 8;

/** However small the smallest weight of an inexact σ is, symmetries are not accepted with a larger residual than this. */
export const MAX_STATE_ERROR = 1e-6;

/** Given jumps count as modular, traceless, orthogonal and paired when they miss it by less than x of their size. */
export const GIVEN_JUMP_TOLERANCE = 1e-10;

/** Values below this times the gap are compared to this times the gap when a bracket's width is judged: a zero can close. */
export const CLOSED_FLOOR = 1e-3;

/** Lanczos works in the whole space up to this dimension, and otherwise keeps this many vectors beside two per eigenpair. */
export const LANCZOS_WHOLE = 160;
export const LANCZOS_SUBSPACE = 40;

/** From this dimension on Lanczos tests for convergence every so many steps, and not only when its subspace is full. */
export const LANCZOS_CHECK_DIMENSION = 4096;
export const LANCZOS_CHECK_STEPS = 5;

/** A witness may state a value below its own quotient by this, relative: decimal rounding of the document. */
export const WITNESS_TOLERANCE = 1e-12;

/** D(ρ‖E†ρ) above which a search takes the entropy production from its definition: relative error near 1e-15/x. */
export const QUICK_ENTROPY = 0.01;

/** D(ρ‖E†ρ) below which a search stops: it is on its way to the projection, where the quotient's limits are known. */
export const SEARCH_NEARNESS = 1e-7;

/** Dimension up to which L is applied by its D×D matrix in entropy computations. */
export const MATRIX_ACTION_LIMIT = 256;

/** Relative gap and infeasibilities at which a semidefinite programme is solved. */
export const PROGRAMME_TOLERANCE = 1e-9;

/** The same for a point with a margin, which is pushed as far as rounding lets it. */
export const PROGRAMME_FINEST = 1e-13;

/** The same, with which a programme whose progress ends in rounding still counts as solved. */
export const PROGRAMME_ACCEPTED = 1e-7;

/** Limit on interior-point iterations; 15 are typical, 40 occur without an interior. */
export const PROGRAMME_ITERATIONS = 100;

/** Iterations without a better point after which an interior-point method has stalled. */
export const PROGRAMME_PATIENCE = 8;

/** A direction of infeasibility may miss its cone or its equations by this, relative to its gain. */
export const INFEASIBILITY_TOLERANCE = 1e-8;

/** ‖A(X)‖/|<C, X>| below which a projection of X is tried as a proof of infeasibility. */
export const INFEASIBILITY_CANDIDATE = 0.1;

/** Pivot of the Gram matrix of unit coefficients, a squared distance, below which dependence is looked into. */
export const DEPENDENCE_PIVOT = 1e-11;

/** ‖Σ c_j A_j‖/Σ|c_j| for unit A_j below which they are dependent. */
export const DEPENDENCE_RESIDUAL = 1e-13;

/** Norm of a coefficient, relative to the largest of all, below which it is rounding. */
export const NEGLIGIBLE_COEFFICIENT = 1e-14;

/** |Σ c_j b_j|/Σ|c_j b_j| above which dependent coefficients contradict the objective. */
export const OBJECTIVE_CONSISTENCY = 1e-10;

/** Share of non-zero coordinates from which a coefficient is stored densely. */
export const DENSE_COEFFICIENT = 0.3;

/** Speed, in products per nanosecond, of the register-blocked kernel and of single inner products (measured). */
export const DENSE_RATE = 6;
export const DOT_RATE = 0.7;

/** Pivots of the Schur complement below x times the rounding of their diagonal entry are lost. */
export const SCHUR_PIVOT = 0.01;

/** Conjugate-gradient steps on a Schur complement after its Cholesky solve. */
export const SCHUR_REFINEMENTS = 20;

/** Relative residual at which they end. */
export const SCHUR_RESIDUAL = 1e-14;

/** Refinements of a primal step at most, and the norm of b − A(X + dX), for ‖b‖ = 1, that needs none. */
export const STEP_REFINEMENTS = 4;
export const STEP_RESIDUAL = 1e-13;

/** Lanczos steps for one step length at most. */
export const LANCZOS_STEPS = 60;

/** Lanczos steps before a Ritz value is believed to belong to the smallest eigenvalue. */
export const LANCZOS_FEWEST = 12;

/** Residual of a Ritz value, relative to the larger of it and 1, that is good enough for a step length. */
export const LANCZOS_ACCURACY = 0.01;

/** Norm of C − S − Aᵀy, in units of ‖C‖, from which S is recomputed from y. */
export const DUAL_DRIFT = 1e-12;

/** A point of an interior-point method counts as progress when its worst measure falls below this share of the best one. */
export const PROGRESS = 0.9;

/** Step lengths below this are no step. */
export const SHORTEST_STEP = 1e-8;

/** Scaled barrier parameter below which the centring rule stops being superlinear. */
export const SMALL_BARRIER = 1e-6;

/** Relative residual below which a unitary counts as permuting the jumps of a model. */
export const JUMP_SYMMETRY_TOLERANCE = 1e-10;

/** Eigenvalues of the intertwining equations' Gram matrix below this, relative, are free directions. */
export const CONSTRAINT_RANK = 1e-12;

/** Largest entry of ∂L − L̂∂, relative, at which an ansatz counts as having a lift. */
export const CONSTRAINT_RESIDUAL = 1e-9;

/** A lift is offered for a K below the optimum of its programme by one of these, relative: the first at which the form passes. */
export const LIFT_BACK_OFFS = [1e-9, 1e-8, 1e-7, 1e-6] as const;

/** An eigenvalue of a lift's form above minus this, relative to the form, counts as not negative. */
export const FORM_ROUNDING = 1e-14;

/** A lift within this of its target, relative to the larger of 1 and the target, closes the bracket: the ladder stops. */
export const LIFT_CLOSED = 1e-6;

/** Largest side of the form of a full lift that a sheet will try by itself; `certify` goes further. */
export const SHEET_LIFT_SIDE = 260;

/** Products of matrices with fewer multiplications than this stay out of WebAssembly, where copying would cost more. */
export const SIMD_FLOOR = 1000;

/** Inner indices that one call of the WebAssembly product covers: both operands of a tile then fit the first-level cache. */
export const SIMD_CHUNK = 512;

/** Raises of the diagonal of a Schur complement, in units of its rounding, tried in turn until no pivot is lost. */
export const SCHUR_SHIFTS = [0, 0.1, 1, 10, 100, 1000] as const;

/** Most real unknowns of a lift that a sheet will try by itself. */
export const SHEET_LIFT_UNKNOWNS = 250;

/** Largest side of a form, and most real unknowns of its programme, that `certify` will try. */
export const CERTIFY_LIFT_SIDE = 1000;
export const CERTIFY_LIFT_UNKNOWNS = 1500;

/** Off-diagonal entries of σ below this, relative to the diagonal ones, leave its given basis as the eigenbasis. */
export const STATE_OFF_DIAGONAL = 1e-10;

/** Entries of a jump in the eigenbasis of σ below this fraction of its norm are rounding. */
export const JUMP_DUST = 1e-13;

/** A flow along eigenvectors is kept where the error bound stays below this, relative to the first deviation. */
export const FLOW_RESIDUAL = 1e-10;

/** Largest time times norm bound of a generator that is propagated by Taylor steps. */
export const FLOW_STEPS_LIMIT = 2e5;

/** ‖τ^{-1/2}(ρ−τ)τ^{-1/2}‖ below which entropies relative to τ are integrals over ρ − τ, without cancellation. */
export const FLOW_NEAR_LIMIT = 0.1;

/** An eigenvalue zero that grows slower than this, relative to the fastest entry of L†ρ, stays zero but for rounding. */
export const FLOW_INFLOW = 1e-12;

/** A flow may lie above a proved bound by this, relative, beside the errors stated of both; more is a bug. */
export const FLOW_BOUND_ROUNDING = 1e-12;

/** Up to this dimension of M ⊗ M_k, L ⊗ id is one real matrix: its D² products cost less than k² smaller actions. */
export const AMPLIFIED_ACTION_LIMIT = 100;

/** Most points of one flow. */
export const FLOW_POINTS_LIMIT = 10_000;

/** ‖·‖₂ distance below which states that are to span a plane count as being on a line. */
export const SLICE_COLLINEAR = 1e-9;

/** Fewest and most states at which a relief is evaluated. */
export const RELIEF_FEWEST = 100;
export const RELIEF_MOST = 40_000;

/** The lowest point of a relief is sought down to this part of a cell of its grid. */
export const RELIEF_REFINEMENT = 1e-6;

/** Coefficients of a lift below this, relative to the largest, are rounding when it is written over other jumps. */
export const TRANSFER_DUST = 1e-12;

/** Values of κ within this, relative, are the same where the lowest is sought. */
export const RELIEF_ROUNDING = 1e-12;
