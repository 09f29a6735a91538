"""Margin rules (F22) and the verdict of a pump."""
from inventory import Unbounded
from physics import water_at


def measure(rule, pump, found, corner):
    """What the rule's tier is chosen by; None: not known."""
    station = pump.station
    try:
        if rule.measure == "suction specific speed":
            return pump.specific_speed()
        if rule.measure == "suction energy":
            water = water_at(found["kelvin"], station.salinity())
            return pump.suction_energy(water.rho)
        return lift(pump, found)
    except Unbounded:
        return None


def lift(pump, found):
    """Source surface under the eye, 0 on a main."""
    if pump.station.source_kind()[0] == "main":
        return 0.0
    if found["elevation"] is None:
        raise Unbounded
    return -found["elevation"]


def tier_required(tier, npshr):
    _, ratio, floor = tier
    return max(ratio * npshr, npshr + floor)


def required(rule, pump, found, corner):
    npshr = found["npshr"]
    if npshr is None:
        return None
    if rule.make_up is not None and pump.make_up != rule.make_up:
        return npshr
    if rule.measure == "none" or len(rule.tiers) == 1:
        return tier_required(rule.tiers[0], npshr)
    value = measure(rule, pump, found, corner)
    asked = [tier_required(tier, npshr) for tier in rule.tiers]
    if value is None:
        return {"typical": None, "adverse": max(asked),
                "favourable": min(asked)}[corner]
    return [one for tier, one in zip(rule.tiers, asked)
            if tier[0] is None or tier[0] < value][-1]


def judge(rule, pump, found, corner):
    """Adds what the rule asks for, margin and surplus."""
    need = required(rule, pump, found, corner)
    found.update(required=need, margin=None, surplus=None)
    npsha, npshr = found["npsha"], found["npshr"]
    if npsha is not None and npshr is not None:
        found["margin"] = npsha - npshr
        if need is not None:
            found["surplus"] = npsha - need
            if rule.lift_limit is not None and pump.make_up == rule.make_up:
                found["surplus"] = min(
                    found["surplus"], rule.lift_limit - npshr
                    - lift(pump, found) + found["friction"] + found["minor"])
                found["required"] = npsha - found["surplus"]
    return found


def state(typical, adverse, favourable, off_curve):
    """What is proven, and what is likely."""
    surplus = favourable["surplus"]
    if surplus is not None and favourable["margin"] < 0:
        proven = "short"
    elif surplus is not None and surplus < 0:
        proven = "thin"
    elif adverse["surplus"] is not None and adverse["surplus"] >= 0 and (
            not off_curve):
        proven = "clear"
    else:
        proven = "unproven"
    if proven in ("short", "thin"):
        return proven, proven
    if typical["surplus"] is None:
        return proven, "unproven"
    if typical["margin"] < 0:
        return proven, "short"
    return proven, "thin" if typical["surplus"] < 0 else "clear"
