"""Formulas that the kinds of spring share, written anew from the published sources named beside each. mm, N, MPa, g."""
from bisect import bisect_left
from math import exp, pi

# EN 15800 (DIN 2095): diameter tolerance, plus or minus mm, by mean diameter "to", for index 4-8, 8-14, 14-20.
DIAMETERS_TO = [1, 1.6, 2.5, 4, 6.3, 10, 16, 25, 31.5, 40, 50, 63, 80, 100, 125, 160, 200]
TOLERANCES = {
    1: [(0.05, 0.07, 0.10), (0.05, 0.07, 0.10), (0.07, 0.10, 0.15), (0.10, 0.10, 0.15), (0.10, 0.15, 0.20), (0.15, 0.15, 0.20), (0.15, 0.20, 0.25), (0.20, 0.25, 0.30),
        (0.25, 0.30, 0.35), (0.25, 0.30, 0.35), (0.30, 0.40, 0.50), (0.40, 0.50, 0.60), (0.50, 0.70, 0.80), (0.60, 0.80, 0.90), (0.70, 1.00, 1.10), (0.90, 1.20, 1.40), (1.20, 1.50, 1.70)],
    2: [(0.07, 0.10, 0.15), (0.08, 0.10, 0.15), (0.10, 0.15, 0.20), (0.15, 0.20, 0.25), (0.20, 0.25, 0.30), (0.25, 0.30, 0.35), (0.30, 0.35, 0.40), (0.35, 0.45, 0.50),
        (0.40, 0.50, 0.60), (0.50, 0.60, 0.70), (0.60, 0.80, 0.90), (0.80, 1.00, 1.10), (1.00, 1.20, 1.40), (1.20, 1.50, 1.70), (1.40, 1.90, 2.20), (1.80, 2.30, 2.70), (2.10, 2.90, 3.30)],
    3: [(0.10, 0.15, 0.20), (0.15, 0.20, 0.30), (0.20, 0.30, 0.40), (0.30, 0.40, 0.50), (0.40, 0.50, 0.60), (0.50, 0.60, 0.70), (0.60, 0.70, 0.80), (0.70, 0.90, 1.00),
        (0.80, 1.00, 1.20), (1.00, 1.20, 1.50), (1.20, 1.50, 1.80), (1.50, 2.00, 2.30), (1.80, 2.40, 2.80), (2.30, 3.00, 3.50), (2.80, 3.70, 4.40), (3.50, 4.60, 5.40), (4.20, 5.70, 6.60)],
}


def diameter_tolerance(D, w, grade):
    """Plus or minus mm; nought outside the table."""
    if not 0.63 <= D <= 200 or not 4 <= w <= 20:
        return 0.0
    column = 0 if w <= 8 else 1 if w <= 14 else 2
    return TOLERANCES[grade][bisect_left(DIAMETERS_TO, D)][column]


def bergstraesser(w):
    """EN 13906-1, k = (w + 0.5)/(w - 0.75)."""
    return (w + 0.5) / (w - 0.75)


def wahl(w):
    """Wahl's factor (Shigley)."""
    return (4 * w - 1) / (4 * w - 4) + 0.615 / w


def shear(F, D, d):
    """Uncorrected shear stress, 8 F D/(pi d^3)."""
    return 8 * F * D / (pi * d**3)


def wire_mass(d, length, density):
    return pi / 4 * d**2 * length * density * 1e-6


def goodman_factor(high, low, strength, peened):
    """Safety factor between two stresses: Goodman's line through Zimmerli's point, Ssu = 0.67 Sut, on the load line."""
    amplitude_point, mean_point = (398, 534) if peened else (241, 379)
    ultimate = 0.67 * strength
    if ultimate <= mean_point:
        return 0.0
    endurance = amplitude_point / (1 - mean_point / ultimate)
    amplitude = (high - low) / 2
    mean = (high + low) / 2
    line = amplitude / mean
    return line * endurance * ultimate / (line * ultimate + endurance) / amplitude


def bending_goodman_factor(high, low, strength):
    """The same in bending, not peened: the reversed strength over 0.577, against the tensile strength."""
    ultimate = 0.67 * strength
    if ultimate <= 379:
        return 0.0
    endurance = 241 / (1 - 379 / ultimate) / BENDING_OVER_TORSION
    amplitude = (high - low) / 2
    mean = (high + low) / 2
    line = amplitude / mean
    return line * endurance * strength / (line * strength + endurance) / amplitude


def initial_stress_range(w):
    """Preferred initial-tension stress, least and greatest (Shigley)."""
    middle = 231 / exp(0.105 * w)
    spread = 6.9 * (4 - (w - 3) / 6.5)
    return middle - spread, middle + spread


# Distortion energy (Shigley, extension springs).
BENDING_OVER_TORSION = 0.577

# Static limits as fractions of tensile strength: Shigley, torsional yield without presetting.
NOT_PRESET = {"cold-drawn-carbon": 0.45, "tempered-steel": 0.50, "stainless": 0.35, "copper-alloy": 0.35}


def over(value, limit):
    """How far a value is over its limit, as a share; nought or less where it holds."""
    return value / limit - 1


def under(value, limit):
    """How far a value is under its limit, as a share; nought or less where it holds."""
    return 1 - value / limit
