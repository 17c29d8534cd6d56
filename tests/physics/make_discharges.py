"""Makes tests/physics/discharges.csv: discharges of two cells in a physics model.

The figures are what the simulation's kinetic battery is held against. The kept output was made with
PyBaMM 26.10.1.1; its head names all versions. Run with an environment that has it installed:

    pip install pybamm==26.10.1.1
    python tests/physics/make_discharges.py [OUTPUT]

Kinds of row: `steady` is a constant current from full to the cut-off (hours, Ah); `profile` is a changing
current, scaled to take exactly one C20 at a scale of one, and the greatest scale that the cell survives.
"""

import importlib.metadata
import platform
import sys
from pathlib import Path

import pybamm

PACKAGES = ("pybamm", "pybammsolvers", "casadi", "numpy", "scipy")
# Currents over C20 and hours, before they are scaled.
PROFILES = {
    "stepped": [(0.10, 1), (0.25, 0.5), (0.05, 1), (0.30, 0.25), (0.12, 1), (0.20, 1.25)],
    "high_first": [(0.40, 1), (0.10, 4)],
    "short_peaks": [(0.08, 0.9), (0.60, 0.1)] * 5,
    "peak_at_end": [(0.12, 4.75), (0.80, 0.25)],
    "evening": [(0.03, 4), (0.15, 3), (0.05, 3), (0.10, 2)],
}
# Multiples of C20 per hour.
RATES = (0.02, 0.05, 0.1, 0.2, 0.3, 0.5, 1.0)
# Hours at which a data sheet would rate the cell.
SHEET = (20, 5, 1)


class Cell:
    """A cell of a parameter set with its model and cut-off."""

    def __init__(self, name: str, model: pybamm.BaseModel, cut_off: float, guess: float) -> None:
        self.name, self.model, self.cut_off = name, model, cut_off
        self.values = pybamm.ParameterValues(name)
        self.values["Lower voltage cut-off [V]"] = cut_off
        self.c20 = guess
        self.c20 = 20 * self.current_for(20.0)

    def hours(self, current: float) -> float:
        """Hours that a constant current takes from full to the cut-off."""
        self.values["Current function [A]"] = current
        simulation = pybamm.Simulation(self.model, parameter_values=self.values)
        solution = simulation.solve([0, 1.5 * 3600 * self.c20 / current])
        return float(solution.t[-1]) / 3600

    def current_for(self, hours: float) -> float:
        """The current that lasts exactly so many hours."""
        low, high = self.c20 / hours * 0.6, self.c20 / hours * 1.1
        while high / low > 1 + 1e-6:
            middle = (low + high) / 2
            low, high = (middle, high) if self.hours(middle) > hours else (low, middle)
        return (low + high) / 2

    def survives(self, steps: list[tuple[float, float]]) -> bool:
        """Whether the cell is above its cut-off to the end of steps of amperes and hours."""
        self.values["Current function [A]"] = "[input]"
        simulation = pybamm.Simulation(self.model, parameter_values=self.values)
        solution = None
        for current, hours in steps:
            inputs = {"Current function [A]": current}
            try:
                solution = simulation.step(3600 * hours, inputs=inputs, starting_solution=solution)
            except pybamm.SolverError:  # Below the cut-off as soon as this current is drawn.
                return False
            if solution.termination != "final time":
                return False
        return True

    def scale(self, steps: list[tuple[float, float]]) -> float:
        """The greatest scale of a profile that the cell survives."""
        charge = sum(current * hours for current, hours in steps)
        amperes = [(current / charge * self.c20, hours) for current, hours in steps]
        low, high = 0.5, 1.1
        while high - low > 1e-4:
            middle = (low + high) / 2
            fits = self.survives([(current * middle, hours) for current, hours in amperes])
            low, high = (middle, high) if fits else (low, middle)
        return low


def main() -> None:
    """Writes the table."""
    here = Path(__file__).with_name("discharges.csv")
    output = Path(sys.argv[1]) if len(sys.argv) > 1 else here
    pybamm.set_logging_level("ERROR")
    cells = [
        Cell("Sulzer2019", pybamm.lead_acid.Full(), 1.75, 21.6),
        Cell("Prada2013", pybamm.lithium_ion.DFN(), 2.0, 2.285),
    ]
    versions = ", ".join(f"{name} {importlib.metadata.version(name)}" for name in PACKAGES)
    lines = [
        f"# {versions}, Python {platform.python_version()}",
        "# Sulzer2019: full lead-acid model, 1.75 V a cell, 294.85 K. Prada2013: Doyle-Fuller-Newman, 2.0 V, 298 K.",
        "# No temperature law and no ageing are used: these models have none that can be relied on.",
        "kind,cell,name,current_a,hours,ah,scale",
    ]
    for cell in cells:
        currents = [(f"{rate} C20", rate * cell.c20) for rate in RATES]
        currents += [(f"{hours} h", cell.current_for(hours)) for hours in SHEET]
        for name, current in currents:
            hours = cell.hours(current)
            lines.append(f"steady,{cell.name},{name},{current:.6f},{hours:.4f},{current * hours:.4f},")
        for name, steps in PROFILES.items():
            lines.append(f"profile,{cell.name},{name},,,,{cell.scale(steps):.4f}")
    output.write_text("\n".join(lines) + "\n", encoding="utf-8")


if __name__ == "__main__":
    main()
