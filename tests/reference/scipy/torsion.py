"""Torsion springs with two legs: a request, what is free to choose, the mass, and how far each requirement is missed."""
from math import pi

from common import bending_goodman_factor, diameter_tolerance, over, under, wire_mass

# Bending yield without presetting (Jindal ex. 8-9; Shigley).
BENDING = {"cold-drawn-carbon": 0.78, "tempered-steel": 0.87, "stainless": 0.61, "copper-alloy": 0.61}


class Spring:
    """A closed body; its share of the angle winds it up, the legs take the rest."""

    def __init__(self, request, wire, D, body):
        self.request, self.wire, self.D, self.body = request, wire, D, body
        d = self.d = wire["diameter"]
        self.w = D / d
        legs = sum(request["legs"])
        self.active = body + legs / (3 * pi * D)
        # Bending theory (EN 13906-3), or with friction between the coils allowed for (Jindal); per degree.
        constant = 64 * 180 / pi if request["method"] == "en13906" else 10.8 * 360
        self.rate = wire["youngsModulus"] * d**4 / (constant * D * self.active)
        self.legs = legs

    def mass(self):
        return wire_mass(self.d, pi * self.D * self.body + self.legs, self.wire["density"])

    def misses(self):
        """Every requirement as a share by which it is missed; nought or less where it holds."""
        request, d, D, w, body = self.request, self.d, self.D, self.w, self.body
        strength, family = self.wire["strength"], self.wire["family"]
        greatest, least = max(request["moments"]), min(request["moments"]) if len(request["moments"]) > 1 else 0
        bending = 32 / (pi * d**3)
        inner = (4 * w**2 - w - 1) / (4 * w * (w - 1))
        listed = [under(w, 4), over(w, 20), under(body, 3)]
        share = 0.8 if request["opens"] else 1
        if request["method"] == "en13906":
            listed.append(over(bending * greatest, share * 0.7 * strength))
        else:
            listed.append(over(inner * bending * greatest, share * BENDING[family] * strength))
        if request["cycles"] >= 1e5:
            q = (w + 0.07) / (w - 0.75) if request["method"] == "en13906" else inner
            listed.append(over(d, 10))
            listed.append(1.0 if family == "copper-alloy" else -1.0)
            listed.append(under(bending_goodman_factor(q * bending * greatest, q * bending * least, strength), 1))
        turns = greatest / self.rate / 360 * body / self.active * (-1 if request["opens"] else 1)
        turned = D * body / (body + turns) if body + turns > 0 else 1e6
        tolerance = diameter_tolerance(D, w, request["grade"])
        if request["bore"]:
            listed.append(over(max(D, turned) + d + tolerance, request["bore"]))
        if request["rod"]:
            listed.append(under(min(D, turned) - d - tolerance, request["rod"]))
        if request["maxFree"]:
            listed.append(over(d * (body + 1 + max(0, turns)), request["maxFree"]))
        return listed


def bounds(request):
    """What may be chosen beside the wire: the index."""
    return [(4, 20)]


def build(request, wire, chosen):
    """The spring of chosen numbers that turns as asked."""
    d = wire["diameter"]
    D = chosen[0] * d
    moments, angles = request["moments"], request["angles"]
    rate = (moments[1] - moments[0]) / (angles[1] - angles[0]) if len(moments) == 2 else moments[0] / angles[0]
    constant = 64 * 180 / pi if request["method"] == "en13906" else 10.8 * 360
    active = wire["youngsModulus"] * d**4 / (constant * D * rate)
    # Fewer than three coils are refused in any case.
    return Spring(request, wire, D, max(active - sum(request["legs"]) / (3 * pi * D), 0.01))


def chosen_of(design):
    """The numbers of a design that was found elsewhere."""
    return [design["meanDiameter"] / design["wireDiameter"]]
