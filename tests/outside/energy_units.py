#!/usr/bin/env python3
"""Energy units as scipy.constants has them, in J, and the pound in kg, as one JSON document.

scipy's `Btu` is the International Table one, `calorie` the thermochemical one.
"""

import json
import sys

from scipy import constants

UNITS = {
    "J": 1.0,
    "kJ": constants.kilo,
    "kcal_th": constants.kilo * constants.calorie_th,
    "kcal_IT": constants.kilo * constants.calorie_IT,
    "Btu_th": constants.Btu_th,
    "Btu_IT": constants.Btu_IT,
    "lb": constants.pound,
}

json.dump(UNITS, sys.stdout)
