"""Compression springs: a request, what is free to choose, the mass, and how far each requirement is missed."""
from math import inf, pi, sqrt

from common import NOT_PRESET, bergstraesser, diameter_tolerance, goodman_factor, over, shear, under, wahl, wire_mass


class Spring:
    """One spring of a wire. Ends closed and ground, or closed and not ground."""

    def __init__(self, request, wire, D, n, L0):
        self.request, self.wire, self.D, self.n, self.L0 = request, wire, D, n, L0
        d = self.d = wire["diameter"]
        self.w = D / d
        self.ground = request["ends"] == "closed-ground"
        self.rate = wire["shearModulus"] * d**4 / (8 * D**3 * n)
        coils = n + 2
        if request["method"] == "en13906":
            # EN 13906-1: nt d_max, or (nt + 1.5) d_max where the ends are not ground.
            self.solid = (coils + (0 if self.ground else 1.5)) * wire["greatestDiameter"]
        else:
            # Shigley, table 10-1: d Nt, or d (Nt + 1).
            self.solid = (coils + (0 if self.ground else 1)) * d
        self.gaps = n * (0.0015 * D**2 / d + 0.1 * d) * (1.5 if request["cycles"] > 1e4 else 1)

    def force(self, length):
        return self.rate * (self.L0 - length)

    def mass(self):
        pitch = (self.L0 - (2 if self.ground else 3) * self.d) / self.n
        length = self.n * sqrt((pi * self.D) ** 2 + pitch**2) + 2 * pi * self.D
        return wire_mass(self.d, length, self.wire["density"])

    def critical_deflection(self):
        """EN 13906-1."""
        moduli = self.wire["shearModulus"] / self.wire["youngsModulus"]
        root = 1 - (1 - moduli) / (0.5 + moduli) * (pi * self.D / (self.request["seating"] * self.L0)) ** 2
        return inf if root < 0 else self.L0 * 0.5 / (1 - moduli) * (1 - sqrt(root))

    def grown_outside(self):
        d = self.d
        m = (self.L0 - (1 if self.ground else 2.5) * d) / self.n
        growth = max(0, 0.1 * (m**2 - 0.8 * m * d - 0.2 * d**2) / self.D) if m > d else 0
        return self.D + d + growth

    def misses(self):
        """Every requirement as a share by which it is missed; nought or less where it holds."""
        request, wire, d, D, w = self.request, self.wire, self.d, self.D, self.w
        lengths = request["lengths"]
        shortest = min(lengths)
        listed = [under(w, 4), over(w, 20), under(self.n, 2), over(max(lengths), self.L0), over(self.solid + self.gaps, shortest)]
        greatest = self.force(shortest)
        strength = wire["strength"]
        if request["method"] == "en13906":
            limit, factor = 0.56 * strength, 1
        else:
            limit, factor = NOT_PRESET[wire["family"]] * strength, wahl(w)
        listed.append(over(factor * shear(greatest, D, d), limit))
        if request["solidSafe"]:
            listed.append(over(factor * shear(self.force(self.solid), D, d), limit))
        if request["cycles"] >= 1e5:
            k = bergstraesser(w) if request["method"] == "en13906" else wahl(w)
            least = self.force(max(lengths)) if len(lengths) > 1 else 0
            # Zimmerli's data are for steel wire under 10 mm.
            listed.append(over(d, 10))
            listed.append(1.0 if wire["family"] == "copper-alloy" else -1.0)
            listed.append(under(goodman_factor(k * shear(greatest, D, d), k * shear(least, D, d), strength, request["peened"]), 1))
        tolerance = diameter_tolerance(D, w, request["grade"])
        if request["bore"]:
            listed.append(over(self.grown_outside() + tolerance, request["bore"]))
        if request["rod"]:
            listed.append(under(D - d - tolerance, request["rod"]))
        if not (request["bore"] or request["rod"] or request["guided"]):
            listed.append(over(self.L0 - shortest, self.critical_deflection()))
        if request["maxSolid"]:
            listed.append(over(self.solid, request["maxSolid"]))
        if request["maxFree"]:
            listed.append(over(self.L0, request["maxFree"]))
        return listed


def bounds(request):
    """What may be chosen beside the wire: the index, and where one load is given the coils."""
    index = (4, 20)
    return [index] if len(request["lengths"]) == 2 else [index, (2, 60)]


def build(request, wire, chosen):
    """The spring of chosen numbers that carries the loads at their lengths."""
    d = wire["diameter"]
    D = chosen[0] * d
    lengths, forces = request["lengths"], request["forces"]
    if len(lengths) == 2:
        rate = (forces[1] - forces[0]) / (lengths[0] - lengths[1])
        return Spring(request, wire, D, wire["shearModulus"] * d**4 / (8 * D**3 * rate), lengths[0] + forces[0] / rate)
    n = chosen[1]
    rate = wire["shearModulus"] * d**4 / (8 * D**3 * n)
    return Spring(request, wire, D, n, lengths[0] + forces[0] / rate)


def chosen_of(design):
    """The numbers of a design that was found elsewhere."""
    return [design["meanDiameter"] / design["wireDiameter"], design["coils"]]
