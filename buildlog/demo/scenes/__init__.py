"""The demo's shop pictures: each scene builds a small world in space, which is then lit and photographed."""

from buildlog.demo.scenes import around_engine, cockpit, engine, fittings, fuel, metal, papers, people, shop, wood
from buildlog.demo.scenes.sets import Build, View
from buildlog.demo.spec import Colour


def on_floor(x: float, z: float, elevation: float, distance: float, azimuth: float) -> View:
    """Return the view of something large on the shop floor."""
    return View(
        (x, 0.0, z),
        elevation,
        distance,
        azimuth,
        ground="floor",
        colour=(150, 148, 142),
        half_width=5.0,
        depth=(-1.6, 3.0),
    )


def on_wall(z: float, distance: float, elevation: float, azimuth: float, colour: Colour) -> View:
    """Return the view of something fixed to an upright surface."""
    return View(
        (0.0, 0.0, z),
        elevation,
        distance,
        azimuth,
        ground="wall",
        colour=colour,
        half_width=1.6,
        depth=(-0.7, 1.7),
        focus=(0.2, 0.9),
    )


SCENES: dict[str, tuple[Build, View]] = {
    "rib-jig": (wood.rib_jig, View((0, 0.02, 0.0), elevation=48, distance=1.65)),
    "spar-clamps": (wood.spar_clamps, View((0, 0.05, 0.08), elevation=24, distance=1.5, azimuth=-32)),
    "ply-skin": (wood.ply_skin, View((0, 0.05, 0.2), elevation=30, distance=2.0, azimuth=18)),
    "wing-frame": (
        wood.wing_frame,
        View((0, 0.0, 0.55), 26, 4.2, -38, ground="floor", colour=(150, 148, 142), half_width=5.0, depth=(-2.6, 3.0)),
    ),
    "fuselage-frame": (metal.fuselage_frame, on_floor(0.3, 0.75, 22, 5.4, -34)),
    "weld": (
        metal.weld,
        View(
            (0, -0.02, 0.09), 30, 0.62, -14, ground="steel", colour=(128, 120, 112), half_width=0.8, depth=(-0.5, 0.8)
        ),
    ),
    "wheel": (metal.wheel, on_floor(0.0, 0.2, 20, 1.55, 34)),
    "controls": (metal.controls, View((0, 0, 0.12), 20, 1.0, -12, half_width=1.2, depth=(-0.6, 0.7))),
    "torque-seal": (metal.torque_seal, View((0, -0.01, 0.03), 42, 0.58, 20, half_width=0.9, depth=(-0.5, 0.7))),
    "engine-stand": (engine.engine_stand, on_floor(0.0, 0.72, 16, 2.4, 28)),
    "hub-gauge": (engine.hub_gauge, View((-0.03, 0, 0.2), 12, 0.95, -16, half_width=1.4, depth=(-0.6, 0.9))),
    "propeller": (around_engine.propeller, View((0, 0, 0.5), 12, 2.3, 20, half_width=1.6, depth=(-1.0, 1.0))),
    "ignition": (around_engine.ignition, View((0, 0.05, 0.24), 14, 1.15, -20, half_width=1.4, depth=(-0.6, 0.9))),
    "exhaust": (around_engine.exhaust, View((0.05, 0.05, 0.18), 20, 1.35, 16, half_width=1.4, depth=(-0.7, 0.9))),
    "cowl": (around_engine.cowl, on_floor(0.0, 0.42, 20, 2.2, 30)),
    "micrometer": (around_engine.micrometer, View((0, 0.0, 0.14), 26, 1.3, -14, half_width=1.4, depth=(-0.7, 0.8))),
    "carburettor": (fuel.carburettor, View((0.02, 0, 0.26), 14, 1.15, -10, half_width=1.4, depth=(-0.6, 0.9))),
    "tank": (fuel.tank, View((0.02, 0, 0.22), 24, 1.75, -20, half_width=1.6, depth=(-0.9, 1.0))),
    "flow-trial": (fuel.flow_trial, View((-0.06, 0, 0.16), 26, 1.25, 8, half_width=1.4, depth=(-0.7, 0.9))),
    "firewall": (fuel.firewall, on_wall(0.48, 1.85, 14, -18, (150, 154, 158))),
    "panel": (cockpit.panel, on_wall(0.38, 1.75, 6, -10, (96, 98, 100))),
    "wiring": (cockpit.wiring, on_wall(0.3, 1.25, 8, 12, (186, 180, 164))),
    "fuel-valve": (fittings.fuel_valve, on_wall(0.24, 1.2, 8, -16, (88, 90, 94))),
    "plate": (fittings.plate, on_wall(0.26, 1.15, 10, 14, (150, 152, 152))),
    "extinguisher": (fittings.extinguisher, View((0.04, 0.04, 0.19), 16, 1.05, 12, half_width=1.2, depth=(-0.6, 0.9))),
    "label": (shop.label, View((0.0, 0, 0.12), 18, 1.0, 10, half_width=1.2, depth=(-0.6, 0.9))),
    "bench-tools": (shop.bench_tools, View((0, 0, 0.0), elevation=44, distance=1.35, azimuth=-8)),
    "doping": (shop.doping, on_floor(0.0, 0.5, 34, 2.4, 14)),
    "builder": (people.builder, View((0.1, 0.0, 0.3), 24, 1.75, 24, half_width=1.6, depth=(-0.6, 0.9))),
    "hands": (people.hands, View((0.0, 0.02, 0.06), 40, 1.05, -6, half_width=1.4, depth=(-0.9, 0.9))),
    "battery-tray": (papers.battery_tray, on_floor(0.0, 0.2, 28, 1.35, -24)),
    "invoice": (papers.invoice, View((0.0, 0.02, 0.0), elevation=56, distance=1.0, azimuth=9)),
    "stock": (shop.stock, View((0, 0, 0.06), 32, 1.75, -16, half_width=1.6, depth=(-0.9, 1.0))),
    "coupon": (wood.coupon, View((0, -0.08, 0.0), elevation=50, distance=0.85, azimuth=8)),
}
