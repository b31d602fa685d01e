"""Writes units_reference.csv: conversions by pint, to compare the unit table with.

Run: python units_reference.py > units_reference.csv   (needs pint; the version is written in the first line)

Columns: unit as the deck language writes it; pint's spelling; SI factor; offset; SI value of 1 and of 7.3; and why pint
is known to differ, where it does (empty: it must agree to 1e-12).
"""

import pint

registry = pint.UnitRegistry(autoconvert_offset_to_baseunit=True)
quantity = registry.Quantity

BTU = "pint's Btu is 1055.056 J (ISO, rounded), here the International Table one, 1055.05585262 J (NIST SP 811)"

# Deck spelling -> pint spelling (None: the same), and the reason of a known difference.
UNITS = {
    "m": None, "mm": None, "km": None, "µm": "um", "in": "inch", "ft": None, "yd": None, "mi": None, "au": None,
    "m^2": None, "cm^2": None, "ha": "hectare", "ft^2": None, "in^2": "inch^2",
    "m^3": None, "L": "liter", "mL": "milliliter", "gal": "gallon", "ft^3": None,
    "s": None, "ms": None, "min": None, "h": "hour", "d": "day",
    "kg": None, "g": None, "mg": None, "t": "tonne", "lb": None, "oz": None,
    "mol": None, "kmol": None,
    "deg": None, "rad": None, "arcmin": None, "arcsec": None, "rev": "revolution", "rpm": None,
    "%": "percent", "ppm": None,
    "N": None, "kN": None, "lbf": None, "kgf": None,
    "Pa": None, "kPa": None, "MPa": None, "bar": None, "mbar": None, "atm": None, "torr": None, "mmHg": None, "inHg": None,
    "psi": None, "inH2O": None, "ftH2O": None, "mmH2O": "millimeter_H2O",
    "J": None, "kJ": None, "kWh": None, "Wh": "watt_hour", "eV": None,
    "cal": "international_calorie", "cal_th": "cal", "kcal": "kilointernational_calorie",
    "Btu": "Btu_it", "Btu_th": "Btu_th", "therm": "EC_therm",
    "W": None, "kW": None, "hp": None, "TR": "refrigeration_ton",
    "m/s": None, "km/h": "km/hour", "ft/min": None, "m/s^2": None,
    "kg/m^3": None, "lb/ft^3": None, "W/m^2": None, "W/m/K": None, "W/m^2/K": None,
    "J/kg/K": None, "kJ/kg/K": None,
    "Btu/(h.ft.degF)": "Btu_it/(hour*ft*delta_degF)", "Btu/(h.ft^2.degF)": "Btu_it/(hour*ft^2*delta_degF)",
    "Btu/(lb.degF)": "Btu_it/(lb*delta_degF)", "Btu/(h.ft^2)": "Btu_it/(hour*ft^2)", "Btu/h": "Btu_it/hour",
    "kcal/(h.m.K)": "kilointernational_calorie/(hour*m*K)", "W/m^2/degC": "W/m^2/delta_degC",
    "Pa.s": "Pa*s", "mPa.s": "mPa*s", "P": "poise", "cP": "centipoise", "St": "stokes", "cSt": "centistokes",
    "m^2/s": None, "lb/(ft.s)": "lb/(ft*s)", "ft^2/s": None,
    "gpm": "gallon/min", "cfm": "ft^3/min", "L/min": "liter/min", "m^3/h": "m^3/hour",
    "K": None, "degC": None, "degF": None, "degR": None, "1/K": "1/K", "K/m": None, "1/degF": "1/delta_degF",
    "A": None, "C": "coulomb", "V": None, "F": "farad", "Ω": "ohm", "S": "siemens", "Wb": None, "T": "tesla", "H": "henry",
    "lm": None, "lx": None, "kat": None, "Hz": "1/s", "m^0.5": "m^0.5", "kJ/(kg.K)": "kJ/(kg*K)",
}

KNOWN_DIFFERENCES = {
    "therm": BTU + ", therm (EC) is 1.05506e8 J exactly (NIST SP 811), pint's is 1e5 of its Btu",
    "TR": BTU,
}


def si(value, unit):
    return quantity(value, unit).to_base_units().magnitude


def main():
    print(f"# pint {pint.__version__}")
    print("unit;pint;factor;offset;one;seven_point_three;known_difference")
    for unit, spelling in UNITS.items():
        spelling = spelling or unit
        try:
            parsed = registry.parse_units(spelling)
        except (ValueError, AttributeError, pint.UndefinedUnitError):
            raise SystemExit(f"pint does not know {spelling}")
        offset = si(0.0, parsed)
        one, some = si(1.0, parsed), si(7.3, parsed)
        factor = si(1.0, registry.Unit("delta_" + unit)) if unit in ("degC", "degF") else one
        print(f"{unit};{spelling};{factor!r};{offset!r};{one!r};{some!r};{KNOWN_DIFFERENCES.get(unit, '')}")


main()
