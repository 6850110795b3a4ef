"""The energy x distance plane of the detectability integral S with NumPy, one distance at a time: the yardstick of
`npm run bench` beside plane.c, which says the equations, the input and the output. SI units.

    python3 plane.py [intervals, even, 400 unless given] [--values] < input
"""

import math
import sys
import time

import numpy as np

FWHM_PER_SIGMA = 2.354820045
RUNS = 5
# Where the power series of J1 has lost as many digits as the asymptotic one has reached: 1e-11 on both sides.
SERIES_UP_TO = 12.0


def j1(x):
    """Bessel function J1 for x >= 0, absolute error below 1e-10 (Abramowitz and Stegun 9.1.10, 9.2.5)."""
    low = np.minimum(x, SERIES_UP_TO)
    term = low / 2
    series = term.copy()
    for k in range(1, 40):
        term = term * (-(low / 2) ** 2 / (k * (k + 1)))
        series += term
    high = np.maximum(x, SERIES_UP_TO)
    even = np.ones_like(high)
    odd = np.zeros_like(high)
    term = np.ones_like(high)
    for k in range(1, 22):
        term = term * ((4 - (2 * k - 1) ** 2) / (8 * k * high))
        if k % 2:
            odd += (-1) ** (k // 2) * term
        else:
            even += (-1) ** (k // 2) * term
    angle = high - 0.75 * np.pi
    asymptotic = np.sqrt(2 / (np.pi * high)) * (even * np.cos(angle) - odd * np.sin(angle))
    return np.where(x <= SERIES_UP_TO, series, asymptotic)


def thickness(shape, u, size, width):
    """Fourier transform of the thickness; the sphere's in two dimensions, the others' across their length."""
    a = size / 2
    q = 2 * np.pi * a * u
    if shape == "layer":
        return size * width * np.sinc(width * u)
    if shape == "fibre":
        small = q < 1e-6
        safe = np.where(small, 1.0, u)
        return np.where(small, np.pi * a * a, a * j1(q) / safe)
    # Near 0 the difference would cancel; four terms are exact to 1e-16 there.
    small = q < 0.05
    safe = np.where(small, 1.0, q)
    near = 1 / 3 - q**2 / 30 + q**4 / 840 - q**6 / 45360
    return 4 * np.pi * a**3 * np.where(small, near, (np.sin(safe) - safe * np.cos(safe)) / safe**3)


def plane(shape, given, intervals):
    """S[energy, distance]. Buffers are kept: with fresh ones for each distance most of the time goes to memory."""
    wave, delta, beta = given["lambda"][:, None], given["delta"][:, None], given["beta"][:, None]
    scale = (4 * np.pi / given["lambda"]) ** 2
    share = np.arange(intervals + 1) / intervals
    simpson = np.where(np.arange(intervals + 1) % 2 == 1, 4.0, 2.0)
    simpson[0] = simpson[-1] = 1
    signal = np.empty((len(given["lambda"]), len(given["r2"])))
    chi, cosine, sine = np.empty((3, len(wave), intervals + 1))
    for column, r2 in enumerate(given["r2"]):
        m = 1 + r2 / given["r1"]
        p = given["pixel"] / m
        nyquist = 1 / (2 * p)
        u = share * nyquist
        variance = (given["source"] / FWHM_PER_SIGMA * (m - 1) / m) ** 2 + (given["detector"] / FWHM_PER_SIGMA / m) ** 2
        mtf = np.exp(-2 * np.pi**2 * variance * u**2) * np.sinc(u * p)
        measure = 2 * np.pi * u if shape == "sphere" else 2 * given["length"]
        contrast = thickness(shape, u, given["size"], given["width"]) * mtf
        weight = nyquist / intervals / 3 * simpson * measure * contrast**2
        np.multiply(wave, np.pi * r2 / m * u**2, out=chi)
        np.cos(chi, out=cosine)
        np.sin(chi, out=sine)
        cosine *= beta
        sine *= delta
        cosine += sine
        cosine *= cosine
        signal[:, column] = scale * (cosine @ weight)
    return signal


def main():
    arguments = [word for word in sys.argv[1:] if word != "--values"]
    intervals = int(arguments[0]) if arguments else 400
    if intervals < 2 or intervals % 2:
        sys.exit("plane.py: intervals must be even, 2 or more")
    numbers = [float(word) for word in sys.stdin.read().split()]
    energies, distances = int(numbers[0]), int(numbers[1])
    rows = np.array(numbers[9 : 9 + 3 * energies]).reshape(energies, 3)
    given = dict(zip(("r1", "source", "detector", "pixel", "size", "width", "length"), numbers[2:9]))
    given.update({"lambda": rows[:, 0].copy(), "delta": rows[:, 1].copy(), "beta": rows[:, 2].copy()})
    given["r2"] = numbers[9 + 3 * energies :]
    if len(given["r2"]) != distances:
        sys.exit("plane.py: the input does not hold as many distances as it says")
    for shape in ("sphere", "fibre", "layer"):
        took = []
        for _ in range(RUNS):
            begun = time.perf_counter()
            signal = plane(shape, given, intervals)
            took.append((time.perf_counter() - begun) * 1e3)
        print(f"{shape} {sorted(took)[RUNS // 2]:.4f} {math.fsum(signal.ravel()):.17g}")
        if "--values" in sys.argv[1:]:
            print("\n".join(f"{value:.17g}" for value in signal.ravel()))


main()
