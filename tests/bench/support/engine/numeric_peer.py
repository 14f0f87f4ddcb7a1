"""The same nodal equations by numpy and scipy, at their best: reads one request a line, answers one line each.

{"do": "load", "equations": {...}}             makes ready
{"do": "batched", "frequencies": [...], "times": n}   all frequencies in one numpy.linalg.solve, arrays made beforehand
{"do": "samples", "count": n, "frequencies": [...]}   so many samples of element values at each frequency
{"do": "sparse", "frequencies": [...], "times": n}    scipy.sparse.linalg.splu at each frequency, the pattern made beforehand
Each but the first answers {"ms": processor time of all, "check": |output| at the first frequency}.
"""
import json
import sys
import time

import numpy
import scipy
import scipy.sparse
import scipy.sparse.linalg


class Work:
    def __init__(self, equations):
        self.size = equations["size"]
        self.output = equations["output"]
        entries = numpy.array(equations["entries"], dtype=float)
        self.rows = entries[:, 0].astype(int)
        self.columns = entries[:, 1].astype(int)
        self.g, self.c, self.gamma = entries[:, 2].copy(), entries[:, 3].copy(), entries[:, 4].copy()
        right = numpy.array(equations["right"], dtype=float)
        self.right_rows = right[:, 0].astype(int)
        self.right = right[:, 1:]
        self.arrays = {}
        self.options = None

    def right_at(self, omega):
        vector = numpy.zeros(self.size, dtype=complex)
        vector[self.right_rows] = self.right[:, 0] + 1j * (omega * self.right[:, 1] - self.right[:, 2] / omega)
        return vector

    def dense(self, values):
        matrix = numpy.zeros((self.size, self.size))
        matrix[self.rows, self.columns] = values
        return matrix

    def batched(self, frequencies, times):
        count = len(frequencies)
        key = count
        if key not in self.arrays:
            self.arrays[key] = (
                self.dense(self.g),
                self.dense(self.c),
                self.dense(self.gamma),
                numpy.empty((count, self.size, self.size), dtype=complex),
                numpy.empty((count, self.size, self.size)),
                numpy.empty((count, self.size, 1), dtype=complex),
            )
        g, c, gamma, matrices, scratch, vectors = self.arrays[key]
        omega = 2 * numpy.pi * numpy.asarray(frequencies)[:, None, None]
        start = time.process_time()
        for _ in range(times):
            matrices.real = g
            numpy.multiply(omega, c, out=matrices.imag)
            numpy.divide(gamma, omega, out=scratch)
            matrices.imag -= scratch
            vectors[:] = 0
            vectors[:, self.right_rows, 0] = self.right[:, 0] + 1j * (
                omega[:, :, 0] * self.right[:, 1] - self.right[:, 2] / omega[:, :, 0]
            )
            solution = numpy.linalg.solve(matrices, vectors)
        return time.process_time() - start, abs(solution[0, self.output, 0])

    def samples(self, count, frequencies, chunk):
        generator = numpy.random.default_rng(1)
        factor = generator.uniform(0.95, 1.05, count)
        base = (self.dense(self.g), self.dense(self.c), self.dense(self.gamma))
        matrices = numpy.empty((chunk, self.size, self.size), dtype=complex)
        scratch = numpy.empty((chunk, self.size, self.size))
        results = numpy.empty((len(frequencies), count), dtype=complex)
        start = time.process_time()
        for first in range(0, count, chunk):
            part = factor[first : first + chunk, None, None]
            g, c, gamma = (part * values for values in base)
            for place, frequency in enumerate(frequencies):
                omega = 2 * numpy.pi * frequency
                matrices.real = g
                numpy.multiply(c, omega, out=matrices.imag)
                numpy.divide(gamma, omega, out=scratch)
                matrices.imag -= scratch
                vector = self.right_at(omega)[:, None]
                solved = numpy.linalg.solve(matrices, numpy.broadcast_to(vector, (chunk, self.size, 1)))
                results[place, first : first + chunk] = solved[:, self.output, 0]
        return time.process_time() - start, abs(results[0, 0])

    def sparse(self, frequencies, times, options=None):
        order = scipy.sparse.csc_matrix((numpy.arange(1, len(self.rows) + 1, dtype=float), (self.rows, self.columns)))
        place = order.data.astype(int) - 1
        g, c, gamma = self.g[place], self.c[place], self.gamma[place]
        matrix = scipy.sparse.csc_matrix((g.astype(complex), order.indices, order.indptr), shape=(self.size, self.size))
        if options is None:
            options = self.best_options(frequencies)
        start = time.process_time()
        for _ in range(times):
            for frequency in frequencies:
                omega = 2 * numpy.pi * frequency
                matrix.data.real = g
                matrix.data.imag = omega * c - gamma / omega
                solution = scipy.sparse.linalg.splu(matrix, **options).solve(self.right_at(omega))
        return time.process_time() - start, abs(solution[self.output])

    def best_options(self, frequencies):
        """The fastest way of ordering for this matrix, tried once."""
        if self.options is None:
            choices = [
                {"permc_spec": "COLAMD"},
                {"permc_spec": "MMD_AT_PLUS_A", "options": {"SymmetricMode": True}, "diag_pivot_thresh": 0.001},
                {"permc_spec": "COLAMD", "relax": 1},
                {"permc_spec": "MMD_AT_PLUS_A", "options": {"SymmetricMode": True}, "diag_pivot_thresh": 0.001, "relax": 1},
            ]
            spent = [min(self.sparse(frequencies[:1], 3, choice)[0] for _ in range(3)) for choice in choices]
            self.options = choices[spent.index(min(spent))]
        return self.options


work = None
print(json.dumps({"numpy": numpy.__version__, "scipy": scipy.__version__}), flush=True)
for line in sys.stdin:
    request = json.loads(line)
    if request["do"] == "load":
        work = Work(request["equations"])
        print(json.dumps({}), flush=True)
        continue
    if request["do"] == "batched":
        spent, check = work.batched(request["frequencies"], request["times"])
    elif request["do"] == "sparse":
        spent, check = work.sparse(request["frequencies"], request["times"])
    else:
        spent, check = work.samples(request["count"], request["frequencies"], request["chunk"])
    print(json.dumps({"ms": 1000 * spent, "check": check}), flush=True)
