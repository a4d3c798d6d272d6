"""
The other side of the kernel's benchmark: scipy's HalfspaceIntersection (qhull) on the same half-spaces.

Reads one JSON array a line: the half-spaces [h1, h2, h3, -D] of a set, with the origin inside, and a number of runs.
Answers one JSON object a line: milliseconds of each run, bare, and with the ordered corners of every face.
"""

import json
import sys
import time

import numpy as np
import scipy
from scipy.spatial import HalfspaceIntersection


def ordered_faces(solid):
    """The corners of each face in the order in which they go round it: what the bare result leaves to the caller."""
    faces = np.concatenate([np.asarray(facet) for facet in solid.dual_facets])
    corners = np.repeat(np.arange(len(solid.dual_facets)), [len(facet) for facet in solid.dual_facets])
    normals = solid.halfspaces[:, :3]
    axis = np.eye(3)[np.argmin(np.abs(normals), axis=1)]
    across = np.cross(normals, axis)
    along = np.cross(normals, across) / np.linalg.norm(normals, axis=1)[:, None]
    sums = np.zeros_like(normals)
    np.add.at(sums, faces, solid.intersections[corners])
    sizes = np.bincount(faces, minlength=len(normals))
    middles = sums / np.maximum(sizes, 1)[:, None]
    arms = solid.intersections[corners] - middles[faces]
    angles = np.arctan2(np.einsum("ij,ij->i", arms, along[faces]), np.einsum("ij,ij->i", arms, across[faces]))
    order = np.lexsort((angles, faces))
    return np.split(corners[order], np.cumsum(sizes)[:-1])


def timed(halfspaces, runs):
    origin = np.zeros(3)
    bare, ordered = [], []
    for _ in range(runs):
        begin = time.perf_counter()
        solid = HalfspaceIntersection(halfspaces, origin)
        bare.append(1e3 * (time.perf_counter() - begin))
        ordered_faces(solid)
        ordered.append(1e3 * (time.perf_counter() - begin))
    return {"bare": bare, "ordered": ordered, "vertices": len(solid.intersections)}


print(json.dumps({"version": scipy.__version__}), flush=True)
SETS = {}
for line in sys.stdin:
    request = json.loads(line)
    if "halfspaces" in request:
        halfspaces = np.array(request["halfspaces"])
        SETS[request["name"]] = halfspaces / np.linalg.norm(halfspaces[:, :3], axis=1)[:, None]
    print(json.dumps(timed(SETS[request["name"]], request["runs"])), flush=True)
