"""The ranges of Gray and Giorgini's criteria (10 %, 15 degC, 1 atm) by a general-purpose reference library.

Run with CoolProp 8.0.0 it prints what the comment of gray_giorgini.rs quotes:
    air    αΔT = 0.1              28.73 K
    air    change of α = 0.1 α0   28.48 K
    air    ρ g H κ = 0.1          842.7 m
    water  change of α = 0.1 α0   1.275 K
"""

from CoolProp.CoolProp import PropsSI
from scipy.optimize import brentq

T, P, G, LIMIT = 288.15, 101325.0, 9.80665, 0.1


def expansion(fluid, temperature=T):
    return PropsSI("ISOBARIC_EXPANSION_COEFFICIENT", "T", temperature, "P", P, fluid)


def drift(fluid, span):
    return abs(expansion(fluid, T + span / 2) - expansion(fluid, T - span / 2)) / expansion(fluid)


weight = PropsSI("D", "T", T, "P", P, "Air") * G * PropsSI("ISOTHERMAL_COMPRESSIBILITY", "T", T, "P", P, "Air")
print("air    αΔT = 0.1              %.2f K" % (LIMIT / expansion("Air")))
print("air    change of α = 0.1 α0   %.2f K" % brentq(lambda span: drift("Air", span) - LIMIT, 1, 100))
print("air    ρ g H κ = 0.1          %.1f m" % (LIMIT / weight))
print("water  change of α = 0.1 α0   %.3f K" % brentq(lambda span: drift("Water", span) - LIMIT, 0.1, 10))
