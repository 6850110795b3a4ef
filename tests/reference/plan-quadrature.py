"""Integrals of a pair plan by dense quadrature of the published formulas, for tests/reference/fixtures/plan-quadrature.json.

    python3 tests/reference/plan-quadrature.py > tests/reference/fixtures/plan-quadrature.json
    python3 tests/reference/plan-quadrature.py --check    # compares with the open check values instead

Shares nothing with the product: Gauss-Legendre panels, ten nodes each, 200,000 nodes and more on every frequency axis, each
integral twice with different panels; the script stops where the two differ by more than 1e-8. Needs NumPy. SI units.

Contrast: Pogany, Gao, Wilkins, Rev. Sci. Instrum. 68, 2774 (1997). Filter: Paganin et al., J. Microsc. 206, 33 (2002).
Observers: ICRU Report 54 (1996).
"""

import json
import math
import random
import sys

import numpy as np

FWHM_PER_SIGMA = 2.354820045
HC_KEV_ANGSTROM = 12.398419843320026
NODES, WEIGHTS = np.polynomial.legendre.leggauss(10)
AGREEMENT = 1e-8


def panels(low, high, count):
    """Nodes and weights of `count` equal Gauss-Legendre panels."""
    half = (high - low) / count / 2
    middle = low + (2 * np.arange(count) + 1) * half
    return (middle[:, None] + half * NODES).ravel(), np.tile(half * WEIGHTS, count)


def bessel_j1(x):
    """J1 for x >= 0: power series below 1, Bessel's integral by the trapezium rule (exact for periodic functions) to 30,
    Hankel's expansion above; 1e-13 of its amplitude throughout."""
    out = np.empty_like(x)
    small, large = x < 1, x > 30
    half = x[small] / 2
    term = half.copy()
    total = term.copy()
    for k in range(1, 14):
        term *= -half * half / (k * (k + 1))
        total += term
    out[small] = total
    middle = ~small & ~large
    total = np.zeros(int(middle.sum()))
    for theta in (np.arange(96) + 0.5) * np.pi / 96:
        total += np.cos(theta - x[middle] * math.sin(theta))
    out[middle] = total / 96
    z = x[large]
    real, imaginary, term = np.ones_like(z), np.zeros_like(z), np.ones_like(z)
    for k in range(1, 25):
        term = term * (4 - (2 * k - 1) ** 2) / (8 * k * z)
        if k % 4 == 0:
            real += term
        elif k % 4 == 1:
            imaginary += term
        elif k % 4 == 2:
            real -= term
        else:
            imaginary -= term
    angle = z - 0.75 * np.pi
    out[large] = np.sqrt(2 / (np.pi * z)) * (real * np.cos(angle) - imaginary * np.sin(angle))
    return out


def thickness(shape, d, w, u):
    """Fourier transform of the thickness at u > 0; the sphere's in two dimensions."""
    a = d / 2
    q = 2 * np.pi * a * u
    if shape == "sphere":
        near = 1 / 3 - q**2 / 30 + q**4 / 840 - q**6 / 45360 + q**8 / 3991680
        safe = np.maximum(q, 0.1)
        far = (np.sin(safe) - safe * np.cos(safe)) / safe**3
        return 4 * np.pi * a**3 * np.where(q < 0.1, near, far)
    if shape == "fibre":
        return a * bessel_j1(q) / u
    return d * w * np.sinc(w * u)


def geometry(row):
    r1, r2 = row["sourceDistanceM"], row["distanceM"]
    m = 1.0 if r1 is None else (r1 + r2) / r1
    source, detector = row["sourceFwhmM"] / FWHM_PER_SIGMA, row["detectorFwhmM"] / FWHM_PER_SIGMA
    variance = (source * (m - 1) / m) ** 2 + (detector / m) ** 2
    p = row["pixelM"] / m
    return {"spread": r2 / m, "variance": variance, "p": p, "nyquist": 1 / (2 * p)}


def contrasts(row, place, u):
    """(4 pi/lambda)^2 [..]^2 MTF^2 with phase and without, and H."""
    wave = row["wavelengthM"]
    chi = np.pi * wave * place["spread"] * u * u
    mtf = np.exp(-2 * np.pi**2 * place["variance"] * u * u) * np.sinc(u * place["p"])
    with_phase = row["deltaBeta"] * np.cos(chi) + row["deltaDelta"] * np.sin(chi)
    scale = (4 * np.pi / wave * mtf) ** 2
    return scale * with_phase**2, scale * row["deltaBeta"] ** 2, 1 / (1 + chi * row["gammaFilter"])


def slice_of_layer(row, u, count):
    """Integral over all directions of (d w sinc(d u_x) sinc(w u_y))^2 at |u|, by `count` panels for a quarter turn."""
    d, w = row["sizeM"], row["widthM"]
    angles, weights = panels(0, np.pi / 2, count)
    cosine, sine = np.cos(angles), np.sin(angles)
    out = np.empty_like(u)
    for i, value in enumerate(u):
        out[i] = 4 * np.dot(weights, (np.sinc(d * value * cosine) * np.sinc(w * value * sine)) ** 2)
    return (d * w) ** 2 * out


def integrals(row, fine):
    """All six integrals; `fine` is a factor on the number of panels."""
    shape, d, w, length = row["shape"], row["sizeM"], row["widthM"], row["lengthM"]
    place = geometry(row)
    nyquist = place["nyquist"]
    lowest = 1 / (4 * (w if shape == "layer" else d))

    u, step = panels(0, nyquist, int(20000 * fine))
    phase, plain, h = contrasts(row, place, u)
    form = thickness(shape, d, w, u) ** 2
    measure = (2 * np.pi * u if shape == "sphere" else 2 * length) * step * form
    result = {"S": measure @ phase, "SAbsorption": measure @ plain}

    v, v_step = panels(lowest, nyquist, int(20000 * fine))
    v_phase, v_plain, v_h = contrasts(row, place, v)
    v_measure = (2 * np.pi * v if shape == "sphere" else 2 * length) * v_step * thickness(shape, d, w, v) ** 2
    result["SEff"] = (v_measure @ (v_phase * v_h**2)) ** 2 / (v_measure @ (v_phase * v_h**4))
    result["SEffAbsorption"] = v_measure @ v_plain

    if shape == "layer":
        # The angular integral is smooth on the scale of 1/(d + w): fewer nodes along u, forty in each such step, and for chi
        # twenty in each of its turns.
        turns = (d + w) * nyquist
        fringes = row["wavelengthM"] * place["spread"] * nyquist**2
        u, step = panels(0, nyquist, int((300 + 4 * turns + 2 * fringes) * fine))
        phase, plain, h = contrasts(row, place, u)
        measure = slice_of_layer(row, u, int((60 + 4 * turns) * fine)) * u * step

        def tomography(power, filtered):
            return length * (measure @ (power * filtered**2)) ** 2 / (np.pi * (measure @ (u * power * filtered**4)))

    elif shape == "fibre":

        def tomography(power, filtered):
            top = 2 * np.pi * ((step * form * u) @ (power * filtered**2))
            return length * top**2 / (2 * np.pi**2 * ((step * form * u * u) @ (power * filtered**4)))

    else:

        def tomography(power, filtered):
            top = 4 * np.pi * ((step * form * u * u) @ (power * filtered**2))
            return top**2 / (np.pi**3 * ((step * form * u**3) @ (power * filtered**4)))

    result["SCt"] = tomography(phase, h)
    result["SCtAbsorption"] = tomography(plain, 1.0)
    return {name: float(value) for name, value in result.items()}


def computed(row):
    once, twice = integrals(row, 1.0), integrals(row, 1.37)
    for name, value in once.items():
        if not abs(value - twice[name]) <= AGREEMENT * abs(twice[name]):
            sys.exit(f"plan-quadrature.py: {name} is not settled for {row}: {value} and {twice[name]}")
    return twice


def row_of(shape, size, width, length, wave, delta, beta, r1, r2, source, detector, pixel):
    return {
        "shape": shape,
        "sizeM": size,
        "widthM": width,
        "lengthM": length,
        "wavelengthM": wave,
        "deltaDelta": delta,
        "deltaBeta": beta,
        "gammaFilter": abs(delta / beta),
        "sourceDistanceM": r1,
        "distanceM": r2,
        "sourceFwhmM": source,
        "detectorFwhmM": detector,
        "pixelM": pixel,
    }


def rounded(value):
    """Three digits: what a row says is short, and exactly what was computed with."""
    return float(f"{value:.3g}")


# R1 (None: parallel beam), range of R2: R' from 1e-4 to 10 m, magnifications from 1 to 11.
PLACES = [
    (None, (1e-4, 10.0)),
    (None, (1e-3, 3.0)),
    (30.0, (5e-3, 10.0)),
    (145.0, (0.05, 10.0)),
    (0.05, (0.5, 0.5)),
    (0.5, (0.02, 2.0)),
]


def drawn(draw, shape, index):
    """A sensible measurement; sizes, wavelengths, differences evenly drawn in their logarithms."""

    def log(low, high):
        return rounded(math.exp(draw.uniform(math.log(low), math.log(high))))

    r1, (near, far) = PLACES[index % len(PLACES)]
    r2 = log(near, far) if near < far else near
    m = 1 if r1 is None else (r1 + r2) / r1
    while True:
        size = log(1e-6, 5e-4)
        width = min(max(rounded(size * log(0.3, 3)), 1e-6), 5e-4)
        across = min(size, width) if shape == "layer" else size
        # In the object: pixels from a thirtieth (a layer: a fifteenth) to a third of the feature, blur from a fifth of it to
        # 1.5 times it.
        pixel = rounded(m * across / log(3.05, 15 if shape == "layer" else 30))
        detector = rounded(m * across * log(0.2, 1.5))
        source = 0.0 if r1 is None else rounded(min(log(1e-6, 1e-4), 0.5 * across * m / (m - 1)))
        if 5e-7 <= pixel <= 1e-4 and 5e-7 <= detector <= 2e-4 and pixel / m <= across / 3:
            break
    return row_of(
        shape,
        size,
        width if shape == "layer" else 0.0,
        0.0 if shape == "sphere" else rounded(size * log(2, 20)),
        log(1e-11, 2e-10),
        draw.choice([-1, 1]) * log(1e-9, 1e-6),
        draw.choice([-1, 1]) * log(1e-12, 1e-8),
        r1,
        r2,
        source,
        detector,
        pixel,
    )


def extremes():
    """chi at u_N of hundreds and thousands of radians; opposed pairs, pairs with hardly any absorption, contact."""
    yield row_of("sphere", 3e-6, 0.0, 0.0, 2e-10, 8e-7, 9e-9, None, 10.0, 0.0, 6e-7, 5e-7)
    yield row_of("sphere", 5e-4, 0.0, 0.0, 1e-10, -6e-7, -1e-9, None, 5.0, 0.0, 1e-6, 1e-6)
    yield row_of("fibre", 2e-6, 0.0, 1e-4, 2e-10, 1e-6, -5e-9, None, 2.0, 0.0, 5e-7, 6e-7)
    yield row_of("fibre", 3e-4, 0.0, 1e-3, 1.5e-10, 3e-7, 2e-12, 145.0, 9.0, 1e-5, 1.5e-6, 1e-6)
    yield row_of("layer", 1e-5, 2e-6, 1e-4, 2e-10, 5e-7, 5e-9, None, 3.0, 0.0, 5e-7, 6e-7)
    yield row_of("layer", 4e-5, 3e-5, 5e-4, 1e-10, -2e-7, 1e-10, 0.05, 0.5, 1e-6, 5e-6, 6e-6)
    yield row_of("sphere", 1e-5, 0.0, 0.0, 5e-11, 5e-7, 1e-9, None, 1e-4, 0.0, 1e-6, 1e-6)


def fixture():
    draw = random.Random(20261201)
    counts = {"sphere": 12, "fibre": 12, "layer": 10}
    rows = [drawn(draw, shape, index) for shape, count in counts.items() for index in range(count)]
    rows += extremes()
    for row in rows:
        place = geometry(row)
        row["effectiveDistanceM"] = place["spread"]
        row["chiAtNyquist"] = math.pi * row["wavelengthM"] * place["spread"] * place["nyquist"] ** 2
        row.update({f"{name}M2": value for name, value in computed(row).items()})
    head = {
        "source": "Dense quadrature of the published formulas (contrast: Pogany, Gao, Wilkins, Rev. Sci. Instrum. 68, 2774 "
        "(1997); filter: Paganin et al., J. Microsc. 206, 33 (2002); observers: ICRU Report 54 (1996)), settled to 1e-8; "
        "tests/reference/plan-quadrature.py",
        "about": "S, S with deltaDelta = 0 and chi = 0, S_eff of retrieval and its absorption form (from 1/(4d), layer "
        "1/(4w), up), S_CT and its absorption form. Filter 1/(1 + chi gammaFilter), gammaFilter = |deltaDelta/deltaBeta|; "
        "FWHM = 2.354820045 sigma; sourceDistanceM null: a parallel beam; distanceM is from sample to detector, pixel and "
        "blur are those of the detector and the source, not of the object plane",
        "date": "2026-12-01",
        "units": "m, m2, rad",
    }
    lines = [f" {json.dumps(name)}: {json.dumps(value)}," for name, value in head.items()]
    print("{\n" + "\n".join(lines) + '\n "rows": [\n' + ",\n".join("  " + json.dumps(row) for row in rows) + "\n ]\n}")


def check():
    """Against open check values, 1 %: an independent program's."""

    def case(shape, size, width, length, kev, delta_mu_per_cm, delta, r2):
        wave = HC_KEV_ANGSTROM / kev * 1e-10
        beta = delta_mu_per_cm * 100 * wave / 4 / math.pi
        return row_of(shape, size, width, length, wave, delta, beta, 30.0, r2, 5e-5, 2e-6, 1e-6)

    def apatite(shape, r2, width=0.0, length=0.0):
        return case(shape, 1e-5, width, length, 25, 10.496, 6.796e-7, r2)

    expected = [
        (
            "PMMA fibre 0.3 m",
            case("fibre", 2e-5, 0.0, 1e-4, 20, -0.12963, 8.992e-8, 0.3),
            {"S": 0.9233, "SAbsorption": 8.78e-5},
        ),
        ("apatite sphere 0.2 m", apatite("sphere", 0.2), {"S": 2.950, "SAbsorption": 3.718e-3}),
        (
            "apatite sphere 5 mm",
            apatite("sphere", 5e-3),
            {"S": 9.843e-3, "SEff": 6.325e-3, "SEffAbsorption": 3.171e-3, "SCt": 6.881e-3, "SCtAbsorption": 2.320e-3},
        ),
        (
            "apatite sphere 20 mm",
            apatite("sphere", 2e-2),
            {"S": 5.737e-2, "SEff": 1.678e-2, "SEffAbsorption": 3.171e-3, "SCt": 2.346e-2},
        ),
        ("apatite layer 5 mm", apatite("layer", 5e-3, 2e-5, 1e-4), {"SCt": 0.2810, "SCtAbsorption": 0.1513}),
        ("apatite layer 20 mm", apatite("layer", 2e-2, 2e-5, 1e-4), {"SCt": 0.5600}),
        ("apatite fibre 5 mm", apatite("fibre", 5e-3, 0.0, 1e-4), {"SCt": 0.0933, "SCtAbsorption": 0.0423}),
        ("apatite fibre 20 mm", apatite("fibre", 2e-2, 0.0, 1e-4), {"SCt": 0.2353}),
    ]
    worst = 0.0
    for name, row, values in expected:
        got = computed(row)
        for key, value in values.items():
            off = got[key] * 1e12 / value - 1
            worst = max(worst, abs(off))
            print(f"{name:22} {key:15} {got[key] * 1e12:.5g} um2, check value {value:.5g}: {off * 100:+.3f} %")
    if worst > 0.01:
        sys.exit("plan-quadrature.py: more than 1 % from the check values")


check() if "--check" in sys.argv[1:] else fixture()
