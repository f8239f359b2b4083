"""Invented antennas as NEC-2 wires, for the causes of dips: what each wire is, and which of them may be taken away.

A model: name, top and bottom of the sweep (MHz), ground ("perfect" or "none"), feed (element, wire, segment at "start" or
"middle"), `elements`: key -> {kind, lengthM (as a person would measure it), count, heightM, wires, removable}. A wire: x1 y1 z1 x2 y2 z2 radius,
in metres. Everything else is derived. Lengths are round numbers near the handbook's, not tuned to come out well.
"""
import math

def element(kind, length, wires, removable=True, count=1, height=None, where=""):
    return {"kind": kind, "lengthM": length, "count": count, "heightM": height, "where": where, "wires": wires, "removable": removable}

def upright(x, y, low, high, radius): return (x, y, low, x, y, high, radius)

def radials(count, length, height, drop=0.0, radius=0.001):
    turns = [2 * math.pi * k / count for k in range(count)]
    flat, fall = length * math.cos(drop), length * math.sin(drop)
    return [(0, 0, height, flat * math.cos(a), flat * math.sin(a), height - fall, radius) for a in turns]

def model(name, lowest, elements, feed, ground="perfect"):
    return {"name": name, "lowestMhz": lowest, "elements": elements, "feed": feed, "ground": ground}

def square(perimeter, height, radius=0.001):
    side = perimeter / 4
    a, b = side / 2, height + side
    return [(-a, 0, height, a, 0, height, radius), (a, 0, height, a, 0, b, radius),
            (a, 0, b, -a, 0, b, radius), (-a, 0, b, -a, 0, height, radius)]

def vee(half, top, angle, radius=0.001):
    x, z = half * math.cos(angle), top - half * math.sin(angle)
    return [(-x, 0, z, 0, 0, top, radius), (0, 0, top, x, 0, z, radius)]

MODELS = [
    model("vertical-ground", 7.1, {
        "v": element("vertical", 10.07, [upright(0, 0, 0, 10.07, 0.01)], removable=False)}, ("v", 0, "start")),
    model("vertical-mast", 14.1, {
        "v": element("vertical", 5.07, [upright(0, 0, 0, 5.07, 0.006)], removable=False),
        "m": element("mast", 2.3, [upright(0.1, 0, 0, 2.3, 0.012)], where="grounded, a short mast that holds the vertical 10 cm off")}, ("v", 0, "start")),
    model("vertical-pipe", 18.1, {
        "v": element("vertical", 3.95, [upright(0, 0, 0, 3.95, 0.005)], removable=False),
        "m": element("mast", 3.1, [upright(0.08, 0, 0, 3.1, 0.01)], where="grounded, a rain pipe 8 cm away")}, ("v", 0, "start")),
    model("vertical-guys", 10.12, {
        "v": element("vertical", 7.05, [upright(0, 0, 0, 7.05, 0.008)], removable=False),
        "g": element("guy", 4.6, [(0.08, 0, 6.9, 0.9, 0, 2.374, 0.001), (-0.08, 0, 6.9, -0.9, 0, 2.374, 0.001)], count=2,
                     where="insulated at both ends")}, ("v", 0, "start")),
    model("parallel", 7.1, {
        "a": element("vertical", 10.2, [upright(0, 0, 0, 0.1, 0.003), upright(0, 0, 0.1, 10.2, 0.003)], removable=False),
        "b": element("vertical", 4.25, [(0, 0, 0.1, 0.3, 0, 0.1, 0.003), upright(0.3, 0, 0.1, 4.05, 0.003)])}, ("a", 0, "start")),
    model("parallel-mast", 10.12, {
        "a": element("vertical", 7.1, [upright(0, 0, 0, 0.1, 0.003), upright(0, 0, 0.1, 7.1, 0.003)], removable=False),
        "b": element("vertical", 3.55, [(0, 0, 0.1, 0.25, 0, 0.1, 0.003), upright(0.25, 0, 0.1, 3.4, 0.003)]),
        "m": element("mast", 5.6, [upright(-0.14, 0, 0, 5.6, 0.012)], where="grounded, 14 cm away")}, ("a", 0, "start")),
    model("ground-plane", 28.4, {
        "v": element("vertical", 2.52, [upright(0, 0, 3, 5.52, 0.004)], removable=False, height=3),
        "r": element("radial", 2.52, radials(3, 2.52, 3, math.radians(30)), removable=False, count=3, height=3)},
        ("v", 0, "start")),
    model("ground-plane-feedline", 21.2, {
        "v": element("vertical", 3.37, [upright(0, 0, 4, 7.37, 0.004)], removable=False, height=4),
        "r": element("radial", 3.37, radials(2, 3.37, 4, math.radians(20)), removable=False, count=2, height=4),
        "feedline": element("feedline", 4.0, [upright(0, 0, 0, 4, 0.003)], where="straight down, grounded below")}, ("v", 0, "start")),
    model("ground-plane-mast", 14.1, {
        "v": element("vertical", 5.05, [upright(0, 0, 6, 11.05, 0.006)], removable=False, height=6),
        "r": element("radial", 5.05, radials(2, 5.05, 6), removable=False, count=2, height=6),
        "m": element("mast", 6.0, [upright(0, 0, 0, 6, 0.015)], where="grounded, its top joined to the radials")}, ("v", 0, "start")),
    model("dipole", 14.1, {
        "d": element("dipole", 10.14, [(-5.07, 0, 9, 5.07, 0, 9, 0.001)], removable=False, height=9)}, ("d", 0, "middle"),
        ground="none"),
    model("dipole-wire", 10.12, {
        "d": element("dipole", 14.1, [(-7.05, 0, 8, 7.05, 0, 8, 0.001)], removable=False, height=8),
        "w": element("wire", 9.9, [(-4.6, 0.1, 8, 5.3, 0.1, 8, 0.002)], where="an old wire beside it, joined to nothing")}, ("d", 0, "middle")),
    model("dipole-short-wire", 14.1, {
        "d": element("dipole", 10.1, [(-5.05, 0, 9, 5.05, 0, 9, 0.001)], removable=False, height=9),
        "w": element("wire", 4.4, [(-2.0, 0.05, 9, 2.4, 0.05, 9, 0.001)], where="tied to it, joined to nothing")}, ("d", 0, "middle")),
    model("dipole-feedline", 7.1, {
        "d": element("dipole", 20.1, [(-10.05, 0, 10, -0.1, 0, 10, 0.001), (-0.1, 0, 10, 0.1, 0, 10, 0.001), (0.1, 0, 10, 10.05, 0, 10, 0.001)],
                     removable=False, height=10),
        "feedline": element("feedline", 16.0, [(0.1, 0, 10, 0.1, 0, 1, 0.003), (0.1, 0, 1, 0.1, 7, 1, 0.003)],
                            where="down, then along the ground; its far end joined to nothing")}, ("d", 1, "middle")),
    model("dipoles", 14.1, {
        "a": element("dipole", 10.2, [(-5.1, 0, 9, -0.1, 0, 9, 0.001), (-0.1, 0, 9, 0.1, 0, 9, 0.001), (0.1, 0, 9, 5.1, 0, 9, 0.001)],
                     removable=False, height=9),
        "b": element("dipole", 6.9, [(-0.1, 0, 9, -0.1, 0.25, 8.8, 0.001), (-0.1, 0.25, 8.8, -3.23, 0.25, 8.8, 0.001),
                                     (0.1, 0, 9, 0.1, 0.25, 8.8, 0.001), (0.1, 0.25, 8.8, 3.23, 0.25, 8.8, 0.001)], height=9)}, ("a", 1, "middle")),
    model("inverted-vee", 10.12, {
        "d": element("dipole", 14.3, vee(7.15, 9, math.radians(40)), removable=False, height=9),
        "m": element("mast", 9.0, [upright(0, 0, 0, 9, 0.012)], where="grounded, its top joined to one half")}, ("d", 0, "end")),
    model("loop", 21.2, {
        "l": element("loop", 14.4, square(14.4, 4), removable=False, height=4)}, ("l", 0, "middle"), ground="none"),
    model("loop-mast", 18.1, {
        "l": element("loop", 16.9, square(16.9, 3), removable=False, height=3),
        "m": element("mast", 6.1, [upright(-2.25, 0, 0, 6.1, 0.012)], where="grounded, 14 cm beside the loop")}, ("l", 0, "middle")),
    model("vertical-mast-guy", 18.1, {
        "v": element("vertical", 3.95, [upright(0, 0, 0, 3.95, 0.005)], removable=False),
        "m": element("mast", 1.8, [upright(0.08, 0, 0, 1.8, 0.01)], where="grounded, 8 cm away"),
        "g": element("guy", 3.1, [(-0.08, 0, 3.8, -0.6, 0, 0.744, 0.001)], where="insulated at both ends")}, ("v", 0, "start")),
]
