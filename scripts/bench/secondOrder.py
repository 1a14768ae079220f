# The same question as the statistical run answers, in vectorised NumPy: the textbook second-order buck with an ideal
# type III network at 400 frequencies, and from these the crossover, the margins and the closest approach to -1.
import json
import sys
import time

import numpy as np

SAMPLES, POINTS = 10_000, 400


def answer(rng):
    def part(nominal, tolerance):
        return nominal * (1 + tolerance * rng.uniform(-1, 1, (SAMPLES, 1)))

    inductance, capacitance, esr = part(2.2e-6, 0.2), part(188e-6, 0.2), part(0.75e-3, 0.5)
    line, load, ramp = rng.uniform(9, 15, (SAMPLES, 1)), 3.3 / rng.uniform(0.5, 8, (SAMPLES, 1)), part(1.5, 0.1)
    r1, r2, r3 = part(10e3, 0.01), part(12.1e3, 0.01), part(270, 0.01)
    c1, c2, c3 = part(1.5e-9, 0.05), part(33e-12, 0.05), part(1e-9, 0.05)
    s = 2j * np.pi * np.logspace(1, np.log10(250e3), POINTS)

    plant = line / ramp * (1 + s * esr * capacitance)
    plant = plant / (1 + s * (inductance / load + esr * capacitance) + s * s * inductance * capacitance)
    network = (1 + s * r2 * c1) * (1 + s * (r1 + r3) * c3)
    network = network / (s * r1 * (c1 + c2) * (1 + s * r2 * c1 * c2 / (c1 + c2)) * (1 + s * r3 * c3))
    loop = plant * network

    gain = 20 * np.log10(np.abs(loop))
    phase = np.degrees(np.unwrap(np.angle(loop), axis=1))
    rows = np.arange(SAMPLES)
    after = np.argmax(gain < 0, axis=1)
    share = gain[rows, after - 1] / (gain[rows, after - 1] - gain[rows, after])
    phase_margin = 180 + phase[rows, after - 1] + share * (phase[rows, after] - phase[rows, after - 1])
    turned = phase < -180
    gain_margin = np.where(turned.any(axis=1), -gain[rows, np.argmax(turned, axis=1)], np.inf)
    modulus_margin = np.abs(1 + loop).min(axis=1)
    return phase_margin.min(), gain_margin.min(), modulus_margin.min()


rng = np.random.default_rng(1)
answer(rng)  # to warm up
start = time.process_time()
answer(rng)
json.dump(1000 * (time.process_time() - start), sys.stdout)
