"""Makes discharges.csv: discharges of two battery cells in a physics model.

The kept output was made with PyBaMM 26.10.1.1; its head names all versions. To make it again:

    pip install pybamm==26.10.1.1
    python make_discharges.py [OUTPUT]

OUTPUT is discharges.csv beside this script unless given. Kinds of row:

steady   a constant current from full to the cut-off; C20 is the charge of the one that lasts exactly 20 h.
profile  a changing current that takes one C20 at a scale of one, and the largest scale that the cell survives.
"""

import importlib.metadata
import platform
import sys
from collections.abc import Iterator
from dataclasses import dataclass
from pathlib import Path

import pybamm
from scipy.optimize import brentq

CURRENT = "Current function [A]"
PACKAGES = ("pybamm", "pybammsolvers", "casadi", "numpy", "scipy", "pandas")
RATES = (0.02, 0.05, 0.1, 0.2, 0.3, 0.5, 1.0)  # Currents in amperes per ampere-hour of C20.
RATINGS = (20, 5, 1)  # Hours at which a data sheet rates a cell.
Steps = list[tuple[float, float]]  # Currents and the hours that each flows.
PROFILES: dict[str, Steps] = {
    "stepped": [(0.10, 1), (0.25, 0.5), (0.05, 1), (0.30, 0.25), (0.12, 1), (0.20, 1.25)],
    "high_first": [(0.40, 1), (0.10, 4)],
    "short_peaks": [(0.08, 0.9), (0.60, 0.1)] * 5,
    "peak_at_end": [(0.12, 4.75), (0.80, 0.25)],
    "evening": [(0.03, 4), (0.15, 3), (0.05, 3), (0.10, 2)],
}


@dataclass
class Cell:
    """A cell: its parameter set, model, cut-off voltage, rated Ah and constant currents to run."""

    name: str
    model: pybamm.BaseModel
    cut_off: float
    rated: float
    currents: tuple[float, ...]

    def __post_init__(self) -> None:
        """Sets the cut-off and leaves the current open."""
        self.values = pybamm.ParameterValues(self.name)
        self.values.update({"Lower voltage cut-off [V]": self.cut_off, CURRENT: "[input]"})
        self.simulation = self.fresh()

    def fresh(self) -> pybamm.Simulation:
        """A simulation of the full cell."""
        solver = pybamm.IDAKLUSolver(rtol=1e-6, atol=1e-8)
        return pybamm.Simulation(self.model, parameter_values=self.values, solver=solver)

    def hours(self, current: float) -> float:
        """Hours that a constant current lasts from full to the cut-off."""
        solution = self.simulation.solve([0, 7200 * self.rated / current], inputs={CURRENT: current})
        if "Minimum voltage" not in solution.termination:
            raise RuntimeError(f"{self.name} at {current} A ended by: {solution.termination}")
        return float(solution.t[-1]) / 3600

    def current_for(self, hours: float) -> float:
        """The constant current that lasts exactly so many hours."""
        low, high = 0.7 * self.rated / hours, 1.5 * self.rated / hours
        return brentq(lambda current: self.hours(current) / hours - 1, low, high, rtol=1e-7)

    def survives(self, steps: Steps) -> bool:
        """Whether the cell stays above its cut-off through steps of amperes and hours."""
        simulation, solution = self.fresh(), None
        for current, hours in steps:
            try:
                solution = simulation.step(3600 * hours, starting_solution=solution, inputs={CURRENT: current})
            except pybamm.SolverError as error:
                if "non-positive at initial conditions" in str(error):  # Below the cut-off at once.
                    return False
                raise
            if solution.termination != "final time":
                return False
        return True

    def largest_scale(self, steps: Steps) -> float:
        """The largest scale, to 1e-4, at which the cell survives steps of amperes and hours."""
        low, high = 0.5, 1.1
        while high - low > 1e-4:
            middle = (low + high) / 2
            survived = self.survives([(current * middle, hours) for current, hours in steps])
            low, high = (middle, high) if survived else (low, middle)
        return low

    def rows(self) -> Iterator[str]:
        """The lines of the table for this cell."""
        c20 = 20 * self.current_for(20)
        currents = [(f"{current} A", current) for current in self.currents]
        currents += [(f"{rate} C20", rate * c20) for rate in RATES]
        currents += [(f"{hours} h", self.current_for(hours)) for hours in RATINGS]
        for name, current in currents:
            hours = self.hours(current)
            yield f"steady,{self.name},{name},{current:.6f},{hours:.4f},{current * hours:.4f},"
        for name, steps in PROFILES.items():
            charge = sum(current * hours for current, hours in steps)
            scale = self.largest_scale([(current * c20 / charge, hours) for current, hours in steps])
            yield f"profile,{self.name},{name},,,,{scale:.4f}"


def main() -> None:
    """Writes the table."""
    output = Path(sys.argv[1]) if len(sys.argv) > 1 else Path(__file__).with_name("discharges.csv")
    pybamm.set_logging_level("ERROR")
    lead = (0.17, 0.34, 0.85, 1, 1.7, 3.4, 5.1, 8.5, 17, 25.5, 34, 51)
    cells = [
        Cell("Sulzer2019", pybamm.lead_acid.Full(), 1.75, 17.0, lead),
        Cell("Prada2013", pybamm.lithium_ion.DFN(), 2.0, 2.3, (0.115, 0.23, 0.46, 0.69)),
    ]
    versions = ", ".join(f"{name} {importlib.metadata.version(name)}" for name in PACKAGES)
    lines = [
        f"# {versions}, Python {platform.python_version()}",
        "# Made by make_discharges.py. Every run starts full, at the parameter set's own temperature, without ageing.",
        "# Sulzer2019: lead_acid.Full, to 1.75 V a cell, 294.85 K. Prada2013: lithium_ion.DFN, to 2.0 V, 298 K.",
        "kind,cell,name,current_a,hours,ah,scale",
    ]
    lines += [row for cell in cells for row in cell.rows()]
    output.write_text("\n".join(lines) + "\n", encoding="utf-8")


if __name__ == "__main__":
    main()
