"""Writes water_reference.csv: liquid water and steam from two reference libraries.

Run:  python tests/water_reference.py     (needs the packages iapws and CoolProp)

Both libraries evaluate IAPWS-95, so they are independent of IAPWS-IF97, which is what the test compares
with them. Columns are SI: T_K, p_Pa, rho (kg/m3), cp (J/kg/K), mu (Pa.s), k (W/m/K), alpha (1/K),
kappa (1/Pa).
"""

import pathlib
from importlib.metadata import version

from CoolProp.CoolProp import PropsSI
from iapws import IAPWS95

LIQUID_CELSIUS = [0.01, 1, 2, 3, 4, 5, 10, 15, 20, 25, 30, 40, 50, 60, 70, 80, 90, 99,
                  110, 119, 130, 140, 150, 160, 170, 179, 190, 200]
LIQUID_BAR = [1, 2, 5, 10, 20]
STEAM_CELSIUS = [110, 120, 140, 160, 180, 200, 225, 250, 275, 300, 325, 350, 375, 400]


def coolprop(temperature, pressure):
    def get(key):
        return PropsSI(key, "T", temperature, "P", pressure, "Water")

    return [get("D"), get("C"), get("V"), get("L"),
            get("isobaric_expansion_coefficient"), get("isothermal_compressibility")]


def iapws(temperature, pressure):
    state = IAPWS95(T=temperature, P=pressure / 1e6)
    return [state.rho, state.cp * 1e3, state.mu, state.k, state.alfav, state.kappa / 1e6]


def main():
    states = []
    for celsius in LIQUID_CELSIUS:
        temperature = celsius + 273.15
        boils_at = PropsSI("P", "T", temperature, "Q", 0, "Water")
        states += [("water", temperature, bar * 1e5) for bar in LIQUID_BAR if bar * 1e5 > boils_at]
    states += [("steam", celsius + 273.15, 1e5) for celsius in STEAM_CELSIUS]

    lines = [f"# CoolProp {version('CoolProp')} and iapws {version('iapws')} (IAPWS-95); made by water_reference.py",
             "substance,T_K,p_Pa,rho,cp,mu,k,alpha,kappa,reference"]
    for substance, temperature, pressure in states:
        for name, library in (("coolprop", coolprop), ("iapws", iapws)):
            values = ",".join(f"{value:.10g}" for value in library(temperature, pressure))
            lines.append(f"{substance},{temperature:.2f},{pressure:.0f},{values},{name}")
    path = pathlib.Path(__file__).with_name("water_reference.csv")
    path.write_text("\n".join(lines) + "\n", encoding="utf-8")
    print(f"{len(lines) - 2} rows")


if __name__ == "__main__":
    main()
