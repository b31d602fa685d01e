"""Writes substance_reference.csv: what reference libraries give for the built-in substances.

Run:  python tests/substance_reference.py
Needs the packages CoolProp, iapws, thermo and lbh15; their versions go into the last column.

Columns are SI: substance, x (mass fraction), T_K, p_Pa, rho (kg/m3), cp (J/kg/K), mu (Pa.s), k (W/m/K),
alpha (1/K), reference. A field is empty where no library gives a value. Engine oil and transformer oil are in no
library and so not in the table; water and steam have a table of their own, water_reference.csv.
"""

import pathlib
import warnings
from importlib.metadata import version

import numpy as np
from CoolProp.CoolProp import PropsSI

warnings.filterwarnings("ignore")
COOLPROP = "CoolProp " + version("CoolProp")

# Name here, name there, range in K.
GASES = [
    ("air", "Air", 200, 1500),
    ("nitrogen", "Nitrogen", 200, 1500),
    ("oxygen", "Oxygen", 200, 1500),
    ("argon", "Argon", 200, 1500),
    ("carbon_dioxide", "CarbonDioxide", 250, 1100),
    ("helium", "Helium", 110, 1500),
    ("hydrogen", "Hydrogen", 200, 1000),
    ("methane", "Methane", 230, 600),
]


def slope(density, temperature, step=0.5):
    """Thermal expansion as the slope of a density function."""
    return -(density(temperature + step) - density(temperature - step)) / (2 * step * density(temperature))


def temperatures(low, high, count=12):
    """Spaced evenly in the logarithm, as gas properties go with powers of temperature."""
    return np.round(np.geomspace(low, high, count), 2)


def gases():
    for substance, name, low, high in GASES:
        for pressure in (1e5, 5e5):
            for temperature in temperatures(low, high):
                def get(key):
                    return PropsSI(key, "T", temperature, "P", pressure, name)

                yield (substance, 0, temperature, pressure, get("D"), get("C"), get("V"), get("L"),
                       get("isobaric_expansion_coefficient"), COOLPROP)


def incompressible(substance, name, low, high, x=0.0, pressure=1e5):
    fluid = f"INCOMP::{name}" + (f"[{x}]" if x else "")

    def get(key, temperature):
        return PropsSI(key, "T", temperature, "P", pressure, fluid)

    # The library refuses temperatures outside its range, and the slope needs some on either side.
    for temperature in np.round(np.linspace(low + 0.6, high - 0.6, 12), 2):
        yield (substance, x, temperature, pressure, get("D", temperature), get("C", temperature),
               get("V", temperature), get("L", temperature), slope(lambda t: get("D", t), temperature),
               f"{COOLPROP} INCOMP::{name}")


def glycols():
    for substance, name in (("ethylene_glycol", "MEG"), ("propylene_glycol", "MPG")):
        for x in (0.001, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6):
            freezes = PropsSI("T_FREEZE", "T", 300, "P", 1e5, f"INCOMP::{name}[{x}]")
            low = max(freezes + 1.0, 228.15)
            yield from incompressible(substance, name, round(low, 2), 373.15, x)


def sea_water():
    from iapws import SeaWater

    reference = f"iapws {version('iapws')} (IAPWS-08; viscosity {COOLPROP} INCOMP::MITSW)"
    for celsius in (0, 1, 2, 4, 6, 8, 10, 15, 20, 25, 30, 35, 40):
        temperature = celsius + 273.15

        def density(t):
            return SeaWater(T=t, P=0.1, S=0.035).rho

        state = SeaWater(T=temperature, P=0.1, S=0.035)
        viscosity = PropsSI("V", "T", max(temperature, 273.16), "P", 1e6, "INCOMP::MITSW[0.035]")
        yield ("sea_water", 0, temperature, 1e5, state.rho, state.cp * 1e3, viscosity, state.k,
               slope(density, temperature, 0.05), reference)


def ethanol():
    for temperature in np.round(np.linspace(210, 350, 12), 2):
        def get(key):
            return PropsSI(key, "T", temperature, "P", 1e5, "Ethanol")

        yield ("ethanol", 0, temperature, 1e5, get("D"), get("C"), get("V"), get("L"),
               get("isobaric_expansion_coefficient"), COOLPROP)


def thermo_liquid(substance, low, high, methods):
    from chemicals import CAS_from_any, MW, Tb, Tc, Tm
    from thermo import HeatCapacityLiquid, ThermalConductivityLiquid, ViscosityLiquid, VolumeLiquid

    cas = CAS_from_any(substance)
    molar = MW(cas) / 1000
    volume = VolumeLiquid(CASRN=cas, MW=MW(cas), Tb=Tb(cas), Tc=Tc(cas))
    heat = HeatCapacityLiquid(CASRN=cas, MW=MW(cas), Tc=Tc(cas))
    viscosity = ViscosityLiquid(CASRN=cas, MW=MW(cas), Tm=Tm(cas), Tc=Tc(cas))
    conductivity = ThermalConductivityLiquid(CASRN=cas, MW=MW(cas), Tm=Tm(cas), Tb=Tb(cas), Tc=Tc(cas))

    def density(t):
        return molar / volume.calculate(t, methods[0])

    reference = f"thermo {version('thermo')} ({', '.join(methods)})"
    for temperature in np.round(np.linspace(low, high, 12), 2):
        yield (substance, 0, temperature, 1e5, density(temperature),
               heat.calculate(temperature, methods[1]) / molar,
               viscosity.calculate(temperature, methods[2]),
               conductivity.calculate(temperature, methods[3]), slope(density, temperature), reference)


def sodium():
    """Table of Fink and Leibowitz, ANL/RE-95/2 (1995), as it stands in the source data of CoolProp."""
    rows = [(400, 919, 1.372, 87.22, 5.99), (500, 897, 1.334, 80.09, 4.15), (600, 874, 1.301, 73.70, 3.21),
            (700, 852, 1.277, 68.00, 2.64), (800, 828, 1.260, 62.90, 2.27), (900, 805, 1.252, 58.34, 2.01),
            (1000, 781, 1.252, 54.24, 1.81), (1100, 756, 1.261, 50.54, 1.66)]
    for temperature, density, heat, conductivity, viscosity in rows:
        yield ("sodium", 0, temperature, 1e5, density, heat * 1e3, viscosity * 1e-4, conductivity, None,
               "ANL/RE-95/2 table as in the source data of CoolProp")


def lead_bismuth():
    from lbh15 import LBE

    for temperature in np.round(np.linspace(400, 1100, 12), 2):
        liquid = LBE(T=float(temperature))
        yield ("lead_bismuth", 0, temperature, 1e5, liquid.rho, liquid.cp, liquid.mu, liquid.k, liquid.alpha,
               f"lbh15 {version('lbh15')}")


def text(value):
    return "" if value is None else f"{value:.8g}"


def main():
    rows = [*gases(), *glycols(), *sea_water(), *ethanol(),
            *incompressible("silicone_oil", "S800", 233.15, 473.15, pressure=2e6),
            *incompressible("solar_salt", "NaK", 573.15, 873.15),
            *thermo_liquid("glycerol", 293.15, 373.15,
                           ["VDI_PPDS", "ZABRANSKY_SPLINE_C", "VDI_PPDS", "VDI_PPDS"]),
            *thermo_liquid("mercury", 273.15, 573.15, ["Fit 2023", "UNARY", "Fit 2023", "Fit 2023"]),
            *sodium(), *lead_bismuth()]
    lines = ["# made by substance_reference.py",
             "substance,x,T_K,p_Pa,rho,cp,mu,k,alpha,reference"]
    for substance, x, temperature, pressure, *values, reference in rows:
        fields = [substance, f"{x:g}", f"{temperature:g}", f"{pressure:g}", *map(text, values),
                  reference.replace(",", ";")]
        lines.append(",".join(fields))
    path = pathlib.Path(__file__).with_name("substance_reference.csv")
    path.write_text("\n".join(lines) + "\n", encoding="utf-8")
    print(f"{len(rows)} rows")


if __name__ == "__main__":
    main()
