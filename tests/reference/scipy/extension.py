"""Extension springs with full loops: a request, what is free to choose, the mass, and how far each requirement is missed."""
from math import pi

from common import (
    NOT_PRESET, bergstraesser, bending_goodman_factor, diameter_tolerance, goodman_factor, initial_stress_range, over, shear, under, wahl, wire_mass,
)

# Shigley, table 10-7: torsion and bending in the hooks, steel; austenitic steel and non-ferrous metal.
HOOK_TORSION = {"cold-drawn-carbon": 0.40, "tempered-steel": 0.40, "stainless": 0.30, "copper-alloy": 0.30}
HOOK_BENDING = {"cold-drawn-carbon": 0.75, "tempered-steel": 0.75, "stainless": 0.55, "copper-alloy": 0.55}


class Spring:
    """Full loops: r1 = D/2 at the top; where they leave the body the bend is as wide as the inside, r2 = (D - d)/2."""

    def __init__(self, request, wire, D, body, first_length, first_force):
        self.request, self.wire, self.D, self.body = request, wire, D, body
        d = self.d = wire["diameter"]
        self.w = D / d
        # Shigley: Na = Nb + G/E; L0 = 2 (D - d) + (Nb + 1) d.
        self.rate = wire["shearModulus"] * d**4 / (8 * D**3 * (body + wire["shearModulus"] / wire["youngsModulus"]))
        self.L0 = 2 * (D - d) + (body + 1) * d
        self.initial = first_force - self.rate * (first_length - self.L0)

    def force(self, length):
        return self.initial + self.rate * (length - self.L0)

    def mass(self):
        # A full loop takes about one coil.
        return wire_mass(self.d, pi * self.D * self.body + 2 * pi * self.D, self.wire["density"])

    def hook_bending(self, F):
        c1 = self.D / self.d
        factor = (4 * c1**2 - c1 - 1) / (4 * c1 * (c1 - 1))
        return F * (factor * 16 * self.D / (pi * self.d**3) + 4 / (pi * self.d**2))

    def hook_torsion(self, F):
        c2 = (self.D - self.d) / self.d
        return (4 * c2 - 1) / (4 * c2 - 4) * shear(F, self.D, self.d)

    def misses(self):
        """Every requirement as a share by which it is missed; nought or less where it holds."""
        request, d, D, w = self.request, self.d, self.D, self.w
        lengths = request["lengths"]
        strength, family = self.wire["strength"], self.wire["family"]
        greatest = self.force(max(lengths))
        scale = max(request["forces"])
        listed = [under(w, 4), over(w, 20), under(self.body, 3), over(self.L0, min(lengths)), -self.initial / scale]
        listed.append(over(shear(self.initial, D, d), initial_stress_range(w)[1]))
        if request["method"] == "en13906":
            listed.append(over(shear(greatest, D, d), 0.45 * strength))
        else:
            listed.append(over(wahl(w) * shear(greatest, D, d), NOT_PRESET[family] * strength))
        listed.append(over(self.hook_torsion(greatest), HOOK_TORSION[family] * strength))
        listed.append(over(self.hook_bending(greatest), HOOK_BENDING[family] * strength))
        if request["cycles"] >= 1e5:
            k = bergstraesser(w) if request["method"] == "en13906" else wahl(w)
            least = self.force(min(lengths)) if len(lengths) > 1 else 0
            listed.append(over(d, 10))
            listed.append(1.0 if family == "copper-alloy" else -1.0)
            # Peening does not reach between closed coils.
            listed.append(under(goodman_factor(k * shear(greatest, D, d), k * shear(least, D, d), strength, False), 1))
            listed.append(under(goodman_factor(self.hook_torsion(greatest), self.hook_torsion(least), strength, False), 1))
            listed.append(under(bending_goodman_factor(self.hook_bending(greatest), self.hook_bending(least), strength), 1))
        tolerance = diameter_tolerance(D, w, request["grade"])
        if request["bore"]:
            listed.append(over(D + d + tolerance, request["bore"]))
        if request["rod"]:
            listed.append(under(D - d - tolerance, request["rod"]))
        if request["maxFree"]:
            listed.append(over(self.L0, request["maxFree"]))
        return listed


def bounds(request):
    """What may be chosen beside the wire: the index, and where neither a second load nor the free length is given the coils."""
    index = (4, 20)
    return [index] if len(request["lengths"]) == 2 or request["freeLength"] else [index, (3, 80)]


def build(request, wire, chosen):
    """The spring of chosen numbers that carries the loads at their lengths."""
    d = wire["diameter"]
    D = chosen[0] * d
    lengths, forces = request["lengths"], request["forces"]
    if len(lengths) == 2:
        rate = (forces[1] - forces[0]) / (lengths[1] - lengths[0])
        body = wire["shearModulus"] * d**4 / (8 * D**3 * rate) - wire["shearModulus"] / wire["youngsModulus"]
    elif request["freeLength"]:
        body = (request["freeLength"] - 2 * (D - d)) / d - 1
    else:
        body = chosen[1]
    # Fewer than three coils are refused in any case; a spring of less than none has no rate.
    return Spring(request, wire, D, max(body, 0.01), lengths[0], forces[0])


def chosen_of(design):
    """The numbers of a design that was found elsewhere."""
    return [design["meanDiameter"] / design["wireDiameter"], design["coils"]]
