/**
 * The version of everything between approved measurements and the catalogue's rows: adoption, derivation, hosts. It is raised whenever the same
 * measurements on the same scale would give other values. A catalogue that was computed with an older one is computed anew at the next start,
 * as a revision of its own, so that what changed is seen in its history and no release changes under its readers.
 *
 * 1: the first. 2: errors of derived values; membership over all possible hosts, median separations.
 */
export const COMPUTATION_VERSION = 2
