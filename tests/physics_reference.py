"""Makes physics_reference.csv: wall temperatures and characteristic numbers from reference libraries, iterated here.

Properties by CoolProp, Nusselt numbers by ht; each wall temperature is found by bisection (scipy) with properties at the
film temperature. Run with Python 3 and CoolProp, ht, numpy, scipy installed: python3 physics_reference.py > physics_reference.csv
"""

import math
import sys

import CoolProp
import ht
import scipy
from CoolProp.CoolProp import PropsSI
from scipy.optimize import brentq

G = 9.80665
P = 101325.0


def properties(fluid, temperature, pressure=P):
    def get(name):
        return PropsSI(name, "T", temperature, "P", pressure, fluid)

    density, heat_capacity, viscosity, conductivity = get("D"), get("C"), get("V"), get("L")
    expansion = get("isobaric_expansion_coefficient")
    viscous = viscosity / density
    diffusive = conductivity / (density * heat_capacity)
    return dict(rho=density, cp=heat_capacity, k=conductivity, nu=viscous, a=diffusive, alpha=expansion, pr=viscous / diffusive)


def rayleigh(p, difference, length, gravity=G):
    return gravity * p["alpha"] * difference * length**3 / (p["nu"] * p["a"])


def solve(far, coefficient, flux, fluid):
    """Wall temperature at which coefficient(properties, difference) * difference is the flux."""

    def residual(wall):
        p = properties(fluid, 0.5 * (wall + far))
        return coefficient(p, wall - far) * (wall - far) - flux

    high = far + 1.0
    while residual(high) < 0:
        high += 0.5 * (high - far)
    return brentq(residual, far + 1e-6, high, xtol=1e-9)


def emit(name, value):
    print(f"{name},{value:.8g}")


print(f"# made by physics_reference.py: CoolProp {CoolProp.__version__}, ht {ht.__version__}, scipy {scipy.__version__}, Python {sys.version.split()[0]}")
print("name,value")

# The glass door: plate 0.71 m high at 232 degC in air at 23 degC.
p = properties("Air", 273.15 + 0.5 * (232 + 23))
ra = rayleigh(p, 209.0, 0.71)
emit("door rayleigh", ra)
emit("door nusselt", ht.Nu_vertical_plate_Churchill(p["pr"], ra / p["pr"]))


# The same plate with a flux, by the isothermal form of ht with the constant of the flux form put in.
def churchill_flux(pr, ra):
    term = (1 + (0.437 / pr) ** (9 / 16)) ** (8 / 27)
    return (0.825 + 0.387 * ra ** (1 / 6) / term) ** 2


# The form above with the constant of the isothermal plate is ht's: shows that it is typed right.
for pr, ra in ((0.7, 1e8), (7.0, 1e11)):
    term = (1 + (0.492 / pr) ** (9 / 16)) ** (8 / 27)
    own = (0.825 + 0.387 * ra ** (1 / 6) / term) ** 2
    assert abs(own / ht.Nu_vertical_plate_Churchill(pr, ra / pr) - 1) < 1e-12

for name, fluid, height, far, flux in (
    ("plate air flux", "Air", 0.5, 293.15, 300.0),
    ("plate water flux", "Water", 0.5, 293.15, 2.0e4),
):
    wall = solve(far, lambda p, d: churchill_flux(p["pr"], rayleigh(p, d, height)) * p["k"] / height, flux, fluid)
    film = 0.5 * (wall + far)
    emit(name + " mid-height wall", wall)
    emit(name + " rayleigh", rayleigh(properties(fluid, film), wall - far, height))

# A cylinder and a sphere that give off a power.
area = math.pi * 0.05 * 1.0
wall = solve(293.15, lambda p, d: ht.Nu_horizontal_cylinder_Churchill_Chu(p["pr"], rayleigh(p, d, 0.05) / p["pr"]) * p["k"] / 0.05, 60.0 / area, "Air")
emit("cylinder wall", wall)

# A cabinet heated on one side, losing heat through the other: resistances in series, the cavity by Berkovsky and
# Polevikov for H/L 2 to 10 (ht's form), properties at the mean of both sides.
pressure = 0.79e5
cold = 281.15 + 180.0 / (6.0 * 0.6 * 1.1)
area = 0.6 * 1.1


def cavity(hot):
    p = properties("Air", 0.5 * (hot + cold), pressure)
    ra = rayleigh(p, hot - cold, 0.5, 9.81)
    nusselt = 0.22 * (p["pr"] / (0.2 + p["pr"]) * ra) ** 0.28 * (1.1 / 0.5) ** -0.25
    return nusselt * p["k"] / 0.5 * area * (hot - cold) - 180.0


emit("cabinet cold side", cold)
emit("cabinet hot side", brentq(cavity, cold + 1e-3, cold + 500.0, xtol=1e-9))

# A fluid that warms in a closed space: 100 W into 1 m^3 of air from 20 degC for 10 min, no losses, properties at the start.
p = properties("Air", 293.15)
emit("heating end", 293.15 + 100.0 * 600.0 / (p["rho"] * p["cp"]))

# A room with through-flow: what leaves is warmer by the power over mass flow times heat capacity.
p = properties("Air", 289.15)
emit("room fluid", 289.15 + 600.0 / (0.05 * p["rho"] * p["cp"]))

# A plate that is heated by 300 W/m^2 and radiates to surroundings of its own: emissivity 0.9.
def radiating(wall, far=293.15, height=0.5):
    p = properties("Air", 0.5 * (wall + far))
    pr, ra = p["pr"], rayleigh(p, wall - far, height)
    h = ht.Nu_vertical_plate_Churchill(pr, ra / pr) * p["k"] / height
    return h * (wall - far) + 0.9 * 5.670374419e-8 * (wall**4 - far**4) - 300.0


emit("radiating plate wall", brentq(radiating, 293.16, 393.15, xtol=1e-9))

# A channel of two plates with uniform flux: Bar-Cohen and Rohsenow 1984, the upper edge.
def channel(wall, inlet=298.15, spacing=0.008, height=0.2, flux=150.0):
    p = properties("Air", 0.5 * (wall + inlet))
    number = G * p["alpha"] * flux * spacing**5 / (p["k"] * p["nu"] * p["a"] * height)
    nusselt = (48.0 / number + 2.51 / number**0.4) ** -0.5
    return flux * spacing / (p["k"] * nusselt) - (wall - inlet)


emit("channel upper edge", brentq(channel, 298.2, 900.0, xtol=1e-9))

# Tian and Karayiannis 2000: the Rayleigh number of the paper's cavity with reference properties at 30 degC.
p = properties("Air", 303.15)
emit("tian rayleigh", rayleigh(p, 40.0, 0.75))
emit("tian prandtl", p["pr"])
emit("air speed of sound 30 degC", PropsSI("A", "T", 303.15, "P", P, "Air"))
emit("water speed of sound 20 degC", PropsSI("A", "T", 293.15, "P", P, "Water"))
