/** Greatest error of a curve length, mm. */
export const LENGTH_TOLERANCE = 1e-6

/** Greatest distance of a flattened curve from the true one, mm. Lengths then differ by far less than .05 mm. */
export const FLATTEN_TOLERANCE = 0.02

/** Points nearer than this are one point, mm. */
export const POINT_TOLERANCE = 1e-6

/** A mitre longer than this many allowances, measured from the corner, is cut off square. */
export const MITRE_LIMIT = 3
