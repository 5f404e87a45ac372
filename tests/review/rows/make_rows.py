"""Make the rows that try the checks: careful ones, and ones with a single mistake each.

Run it by hand (``python make_rows.py``); it writes ``careful/*.toml`` and ``mistakes/*.toml``
beside itself and gives the same bytes each time. It knows nothing of schedtui: moist air comes
from CoolProp's HumidAir (real gas) in some files and from psychrolib (perfect gas) in the others,
mixing is adiabatic by mass at the site's pressure, and every number is computed in full precision
and only then rounded to the digits that its file prints. What is decided rather than computed
(rooms, weather, flows, pressures, water temperatures) is in the tables further down.
"""

from __future__ import annotations

import importlib.util
import math
from decimal import ROUND_HALF_UP, Decimal
from pathlib import Path
from typing import Any

from CoolProp.CoolProp import PropsSI
from CoolProp.HumidAirProp import HAPropsSI

HERE = Path(__file__).parent
Row = dict[str, Any]

# ------------------------------------------------------------------ moist air


def _psychrolib(system: str) -> Any:
    """Load an own copy of psychrolib, so that its unit switch is never shared."""
    spec = importlib.util.find_spec("psychrolib")
    if spec is None or spec.loader is None:
        raise ImportError("psychrolib is not installed")
    module = importlib.util.module_from_spec(spec)
    spec.loader.exec_module(module)
    module.SetUnitSystem(module.IP if system == "IP" else module.SI)
    return module


class PerfectGas:
    """ASHRAE Fundamentals ch. 1 by psychrolib, in the file's units (psia | Pa, Btu/lb | kJ/kg)."""

    def __init__(self, system: str, pressure: float) -> None:
        self.lib, self.p = _psychrolib(system), pressure
        self.k = 1.0 if system == "IP" else 1000.0

    def w_wb(self, t: float, wb: float) -> float:
        return self.lib.GetHumRatioFromTWetBulb(t, wb, self.p)

    def w_rh(self, t: float, rh: float) -> float:
        return self.lib.GetHumRatioFromRelHum(t, rh / 100, self.p)

    def h(self, t: float, w: float) -> float:
        return self.lib.GetMoistAirEnthalpy(t, w) / self.k

    def t(self, h: float, w: float) -> float:
        return self.lib.GetTDryBulbFromEnthalpyAndHumRatio(h * self.k, w)

    def wb(self, t: float, w: float) -> float:
        return self.lib.GetTWetBulbFromHumRatio(t, w, self.p)

    def rh(self, t: float, w: float) -> float:
        return 100 * self.lib.GetRelHumFromHumRatio(t, w, self.p)

    def v(self, t: float, w: float) -> float:
        return self.lib.GetMoistAirVolume(t, w, self.p)


class RealGas:
    """CoolProp's HumidAir in the file's own units."""

    def __init__(self, system: str, pressure: float) -> None:
        self.ip = system == "IP"
        self.p = pressure * 6894.757293168 if self.ip else pressure

    def _k(self, t: float) -> float:
        return (t + 459.67) / 1.8 if self.ip else t + 273.15

    def _t(self, k: float) -> float:
        return k * 1.8 - 459.67 if self.ip else k - 273.15

    def w_wb(self, t: float, wb: float) -> float:
        return HAPropsSI("W", "T", self._k(t), "B", self._k(wb), "P", self.p)

    def w_rh(self, t: float, rh: float) -> float:
        return HAPropsSI("W", "T", self._k(t), "R", rh / 100, "P", self.p)

    def h(self, t: float, w: float) -> float:
        return HAPropsSI("H", "T", self._k(t), "W", w, "P", self.p) / (
            2326.0 if self.ip else 1000.0
        )

    def t(self, h: float, w: float) -> float:
        joules = h * (2326.0 if self.ip else 1000.0)
        return self._t(HAPropsSI("T", "H", joules, "W", w, "P", self.p))

    def wb(self, t: float, w: float) -> float:
        return self._t(HAPropsSI("B", "T", self._k(t), "W", w, "P", self.p))

    def rh(self, t: float, w: float) -> float:
        return 100 * HAPropsSI("R", "T", self._k(t), "W", w, "P", self.p)

    def v(self, t: float, w: float) -> float:
        v = HAPropsSI("Vda", "T", self._k(t), "W", w, "P", self.p)
        return v * 16.01846337 if self.ip else v


def atmosphere(altitude: float, system: str) -> float:
    """Standard atmosphere, psia of ft or Pa of m."""
    metres = altitude * 0.3048 if system == "IP" else altitude
    pascals = 101325 * (1 - 2.25577e-5 * metres) ** 5.2559
    return pascals / 6894.757293168 if system == "IP" else pascals


# ------------------------------------------------------------------ printing


def to_step(x: float, step: str) -> str:
    """Round half up to a step and print the step's digits ('1', '0.5', '0.1', '10', ...)."""
    s = Decimal(step)
    n = (Decimal(repr(x)) / s).quantize(Decimal(1), ROUND_HALF_UP) * s
    return f"{n:f}" if s < 1 else str(int(n))


def up_to_step(x: float, step: str) -> str:
    s = Decimal(step)
    n = Decimal(math.ceil(Decimal(repr(x)) / s - Decimal("1e-9"))) * s
    return f"{n:f}" if s < 1 else str(int(n))


NEMA = [0.5, 0.75, 1, 1.5, 2, 3, 5, 7.5, 10, 15, 20, 25, 30, 40, 50, 60, 75, 100]
IEC = [0.37, 0.55, 0.75, 1.1, 1.5, 2.2, 3, 4, 5.5, 7.5, 11, 15, 18.5, 22, 30, 37, 45, 55]


# ------------------------------------------------------------------ one unit


class Site:
    """A file: its units, place, basis, digits, engine and weather."""

    def __init__(self, name: str, title: str, **kw: Any) -> None:
        self.name, self.title = name, title
        self.system: str = kw["system"]
        self.ip = self.system == "IP"
        self.altitude: float = kw["altitude"]
        self.basis: str = kw["basis"]
        self.temp: str = kw["temp"]  # printed step of temperatures
        self.load: str = kw["load"]  # printed step of loads
        self.flow: str = kw["flow"]  # printed step of airflows
        self.weather: list[tuple[str, float, float]] = kw["weather"]
        self.rated: str = kw.get("rated", self.weather[0][0])
        self.by_pressure: bool = kw.get("by_pressure", False)
        self.sea = 14.696 if self.ip else 101325.0
        p = atmosphere(self.altitude, self.system)
        if self.by_pressure:  # pressure is then the decision: rounded first
            p = round(p, 2) if self.ip else round(p / 1000, 1) * 1000
        self.p = p
        self.air = (RealGas if kw["engine"] == "real" else PerfectGas)(self.system, p)
        self.ratio = p / self.sea

    def temp_s(self, x: float) -> str:
        return to_step(x, self.temp)

    def mass(self, q: float, basis: str, v: float) -> float:
        """lb/h of cfm or kg/s of L/s."""
        k, rho = (60.0, 0.075) if self.ip else (0.001, 1.2)
        if basis == "actual":
            return k * q / v
        return k * q * rho * (self.ratio if basis == "site" else 1.0)

    def load_of(self, m: float, dh: float) -> float:
        """MBH or kW."""
        return m * dh / 1000 if self.ip else m * dh


def state(site: Site, t: float, w: float) -> dict[str, float]:
    return {"t": t, "w": w, "h": site.air.h(t, w)}


def mix(
    site: Site, a: dict[str, float], ma: float, b: dict[str, float], mb: float
) -> dict[str, float]:
    h = (a["h"] * ma + b["h"] * mb) / (ma + mb)
    w = (a["w"] * ma + b["w"] * mb) / (ma + mb)
    return {"t": site.air.t(h, w), "w": w, "h": h}


def warmed(site: Site, s: dict[str, float], m: float, heat: float) -> dict[str, float]:
    """State after `heat` (MBH | kW) at constant humidity ratio."""
    dh = heat * 1000 / m if site.ip else heat / m
    return {"t": site.air.t(s["h"] + dh, s["w"]), "w": s["w"], "h": s["h"] + dh}


def solve(site: Site, u: Row, weather: tuple[str, float, float]) -> Row:  # noqa: C901, PLR0912, PLR0915 - the air path in one reading
    """Carry the air through the unit in full precision."""
    air = site.air
    basis = u.get("basis", site.basis)
    q, qo = u["q"], u.get("qo", 0.0)
    blow = u.get("blow", False)
    out = state(site, weather[1], air.w_wb(weather[1], weather[2]))
    room = None
    if "room" in u:
        room = state(site, u["room"][0], air.w_rh(u["room"][0], u["room"][1]))
    if "ret_wb" in u:
        ret = state(site, u["ret_wb"][0], air.w_wb(*u["ret_wb"]))
    elif "ret_rh" in u:
        ret = state(site, u["ret_rh"][0], air.w_rh(*u["ret_rh"]))
    elif room:
        ret = state(site, room["t"] + u.get("rise", 0.0), room["w"])
    else:
        ret = out
    fan_v = air.v(u.get("lat", ret["t"]), out["w"] if not room else room["w"])
    for _ in range(60):
        ms = site.mass(q, basis, fan_v)
        mo = ms if qo == q else site.mass(qo, basis, air.v(out["t"], out["w"]))
        oa = dict(out)
        if "wheel" in u:
            es, el = u["wheel"]
            me = site.mass(float(u.get("exhaust") or qo), basis, air.v(ret["t"], ret["w"]))
            k = min(mo, me) / mo
            oa = state(
                site,
                out["t"] - es / 100 * k * (out["t"] - ret["t"]),
                out["w"] - el / 100 * k * (out["w"] - ret["w"]),
            )
        mixed = oa if mo == ms else ret if mo == 0 else mix(site, oa, mo, ret, ms - mo)
        # share of the supply that goes round the coil
        b = u.get("bypass", 0.0) / 100
        mc = ms * (1 - b)
        q_fan = 0.0
        # fan heat needs the fan's actual inlet flow
        k60 = 60.0 if site.ip else 0.001
        q_fan = ms * fan_v / k60
        shaft = (
            q_fan * u["ptot"] / (6356 * u["eta"] / 100)
            if site.ip
            else q_fan * u["ptot"] / (u["eta"] / 100) / 1e6
        )
        heat = shaft * (2.545 if site.ip else 1.0) / (u.get("motor_eff", 92) / 100)
        if u.get("motor_out"):
            heat *= u.get("motor_eff", 92) / 100
        entering, around = mixed, mixed
        if b and u.get("bypass_return"):
            around = ret
            entering = mix(site, oa, mo, ret, mc - mo)
        if blow:
            entering = warmed(site, entering, ms, heat)
            around = warmed(site, around, ms, heat)
        first = None
        if "pre" in u:
            first_in = entering
            w1 = min(air.w_rh(u["pre"][0], u["pre"][1]), entering["w"])
            first = state(site, u["pre"][0], w1)
            entering = first
        if "wrap" in u:
            entering = state(site, entering["t"] - u["wrap"], entering["w"])
        t_l = u["lat"]
        w_l = entering["w"] if u.get("dry") else air.w_rh(t_l, u["lat_rh"])
        if w_l > entering["w"] + 1e-12:
            msg = f"{site.name} {u['tag']}: the coil would moisten: {w_l} > {entering['w']}"
            raise ValueError(msg)
        leaving = state(site, t_l, w_l)
        after = leaving if "wrap" not in u else state(site, t_l + u["wrap"], w_l)
        joined = mix(site, after, mc, around, ms - mc) if b else after
        unit_out = joined if blow else warmed(site, joined, ms, heat)
        inlet = mixed if blow else joined
        v_new = air.v(inlet["t"], inlet["w"])
        if abs(v_new - fan_v) < 1e-12:
            break
        fan_v = v_new
    supply = unit_out
    reheat = None
    if "reheat" in u:
        supply = state(site, u["reheat"], unit_out["w"])
        reheat = site.load_of(ms, supply["h"] - unit_out["h"])
    supply = state(site, supply["t"] + u.get("duct", 0.0), supply["w"])
    total = site.load_of(mc, entering["h"] - leaving["h"])
    sens = site.load_of(mc, air.h(entering["t"], leaving["w"]) - leaving["h"])
    got: Row = {
        "out": out,
        "ret": ret,
        "mixed": mixed,
        "entering": entering,
        "leaving": leaving,
        "unit_out": unit_out,
        "total": total,
        "sens": sens,
        "fan_heat": heat,
        "shaft": shaft,
        "q_coil": q * (1 - b),
        "reheat": reheat,
        "first": first,
        "supply": supply,
        "rh_l": air.rh(leaving["t"], leaving["w"]),
        "ms": ms,
        "mo": mo,
    }
    if first:
        got["pre_total"] = site.load_of(ms, first_in["h"] - first["h"])
        got["first_in"] = first_in
    if room:
        got["room_s"] = site.load_of(
            ms, air.h(room["t"], supply["w"]) - air.h(supply["t"], supply["w"])
        )
        got["room_l"] = site.load_of(
            ms, air.h(room["t"], room["w"]) - air.h(room["t"], supply["w"])
        )
    return got


def water_flow(site: Site, load: float, ewt: float, lwt: float, customary: bool) -> float:
    """gpm of MBH or L/s of kW; customary = the 500 (4.19) of everyone's slide rule."""
    if customary:
        return load * 1000 / (500 * (lwt - ewt)) if site.ip else load / (4.19 * (lwt - ewt))
    mean = (ewt + lwt) / 2
    k = (mean + 459.67) / 1.8 if site.ip else mean + 273.15
    rho, cp = PropsSI("D", "T", k, "P", 3e5, "Water"), PropsSI("C", "T", k, "P", 3e5, "Water")
    watts = load * 293.0710702 if site.ip else load * 1000
    dt = (lwt - ewt) / 1.8 if site.ip else lwt - ewt
    m3s = watts / (rho * cp * dt)
    return m3s * 15850.323 if site.ip else m3s * 1000


def write_row(site: Site, u: Row) -> dict[str, str]:  # noqa: C901, PLR0912, PLR0915 - a row's cells in printed order
    """One schedule row: key → the text of its cell."""
    weather = next(w for w in site.weather if w[0] == u.get("rated", site.rated))
    got = solve(site, u, weather)
    u["_got"] = got
    air, ts = site.air, site.temp_s
    ls = lambda x: to_step(x, site.load)  # noqa: E731
    fs = lambda x: to_step(x, site.flow)  # noqa: E731
    margin = 1 + u.get("margin", 0) / 100
    c: dict[str, str] = {"tag": f'"{u["tag"]}"', "serves": f'"{u["serves"]}"'}
    if u.get("quantity"):
        c["quantity"] = str(u["quantity"])
    if "basis" in u:
        c["airflow_basis"] = f'"{u["basis"]}"'
    if "control" in u:
        c["capacity_control"] = f'"{u["control"]}"'
    q, qo = u["q"], u.get("qo", 0.0)
    c["supply_airflow"] = fs(q)
    c["outdoor_airflow"] = fs(qo)
    if qo and not u.get("no_required"):
        c["outdoor_required"] = fs(qo * u.get("req", 0.96))
    if qo < q:
        c["return_airflow"] = str(int(c["supply_airflow"]) - int(c["outdoor_airflow"]))
    if "exhaust" in u:
        c["exhaust_airflow"] = fs(u["exhaust"])
    if "room" in u:
        c["room_db"], c["room_rh"] = ts(u["room"][0]), str(u["room"][1])
        if u.get("rise"):
            c["return_rise"] = to_step(u["rise"], "0.1" if site.temp != "1" else site.temp)
    if "ret_wb" in u:
        c["return_db"], c["return_wb"] = ts(u["ret_wb"][0]), ts(u["ret_wb"][1])
    if "ret_rh" in u:
        c["return_db"], c["return_rh"] = ts(u["ret_rh"][0]), str(u["ret_rh"][1])
    if u.get("duct"):
        c["duct_rise"] = to_step(u["duct"], "0.1")
    if "room" in u and not u.get("no_loads"):
        c["room_sensible"] = ls(got["room_s"] * (1 - u.get("spare", 2) / 100))
        if got["room_l"] > 0 and not u.get("no_latent"):
            c["room_latent"] = ls(got["room_l"] * (1 - u.get("spare", 2) / 100))
    if "wheel" in u:
        c["recovery_sensible"] = str(u["wheel"][0])
        if u["wheel"][1]:
            c["recovery_latent"] = str(u["wheel"][1])
        c["recovery_drop"] = "0.85" if site.ip else "200"
    if u.get("blow"):
        c["fan_position"] = '"blow-through"'
    c["fan_total_pressure"] = str(u["ptot"])
    c["fan_external_pressure"] = str(
        round(u["ptot"] * 0.45, 1) if site.ip else int(u["ptot"] * 0.045) * 10
    )
    c["fan_efficiency"], c["motor_efficiency"] = str(u["eta"]), str(u.get("motor_eff", 92))
    c["fan_power"] = to_step(got["shaft"], "0.01" if got["shaft"] < 10 else "0.1")
    sizes = NEMA if site.ip else IEC
    c["motor_power"] = str(next(s for s in sizes if s >= 1.15 * got["shaft"]))
    if u.get("motor_out"):
        c["motor_in_airstream"] = "false"
    if got.get("first"):
        f = got["first"]
        c["precool_lat_db"], c["precool_lat_wb"] = ts(f["t"]), ts(air.wb(f["t"], f["w"]))
        c["precool_total"] = ls(got["pre_total"] * margin)
    if "wrap" in u:
        c["wrap_drop"] = to_step(u["wrap"], "0.1")
    if u.get("bypass"):
        if u.get("state_cool_airflow"):
            c["cool_airflow"] = fs(got["q_coil"])
        else:
            c["bypass"] = str(u["bypass"])
        if u.get("bypass_return"):
            c["bypass_source"] = '"return"'
    if u.get("dx"):
        c["cool_kind"] = '"dx"'
        c["cool_ambient_db"] = ts(u["dx"])
    e, lv = got["entering"], got["leaving"]
    c["cool_eat_db"], c["cool_eat_wb"] = ts(e["t"]), ts(air.wb(e["t"], e["w"]))
    if not u.get("no_lat"):
        s = got["unit_out"] if u.get("lat_unit") else lv
        c["cool_lat_db"], c["cool_lat_wb"] = ts(s["t"]), ts(air.wb(s["t"], s["w"]))
        if u.get("lat_unit"):
            c["cool_lat_at"] = '"unit"'
    less = got["fan_heat"] if u.get("net") else 0.0
    total, sens = got["total"] * margin - less, got["sens"] * margin - less
    c["cool_total"], c["cool_sensible"] = ls(total), ls(sens)
    if u.get("tons", True):
        c["cool_tons"] = to_step(total / (12 if site.ip else 3.5168528), "0.1")
    if u.get("net"):
        c["cool_basis"] = '"net"'
    vel = u.get("vel", 460 if site.ip else 2.3)
    c["cool_face_area"] = to_step(
        got["q_coil"] / vel if site.ip else got["q_coil"] / 1000 / vel, "0.1" if site.ip else "0.01"
    )
    if u.get("state_velocity"):
        v = (
            got["q_coil"] / float(c["cool_face_area"])
            if site.ip
            else got["q_coil"] / 1000 / float(c["cool_face_area"])
        )
        c["cool_face_velocity"] = to_step(v, "1" if site.ip else "0.01")
    rows = u.get("rows", 6)
    c["cool_rows"], c["cool_fins"] = str(rows), str(u.get("fins", 10))
    drop = 0.1 * rows * (vel / (460 if site.ip else 2.3)) ** 1.7
    c["cool_air_drop"] = to_step(drop, "0.01") if site.ip else to_step(drop * 245, "5")
    if not u.get("dx"):
        ewt, lwt = u.get("water", (44, 56) if site.ip else (6, 12))
        c["cool_ewt"], c["cool_lwt"] = str(ewt), str(lwt)
        gross = got["total"] * margin
        c["cool_flow"] = up_to_step(
            water_flow(site, gross, ewt, lwt, u.get("customary", True)),
            "0.1" if site.ip else "0.01",
        )
        c["cool_fluid_drop"] = (
            to_step(8 + rows / 2, "0.1") if site.ip else to_step(20 + rows * 2, "1")
        )
    if "reheat" in u:
        c["reheat_kind"] = '"hot water"'
        c["reheat_lat_db"] = ts(u["reheat"])
        c["reheat_total"] = ls(got["reheat"] * margin)
    return c


# ------------------------------------------------------------------ files


def head(site: Site, comments: list[str]) -> str:
    ts = site.temp_s
    lines = [f"# {x}" for x in comments] + [
        "format = 1",
        "",
        "[project]",
        f'title = "{site.title}"',
        f'units = "{site.system}"',
    ]
    if site.by_pressure:
        lines.append(
            f"pressure = {to_step(site.p, '0.01')}"
            if site.ip
            else f"pressure = {to_step(site.p / 1000, '0.1')}"
        )
    else:
        lines.append(f"altitude = {site.altitude}")
    lines.append(f'airflow_basis = "{site.basis}"')
    for name, db, wb in site.weather:
        lines += [
            "",
            "[[condition]]",
            f'name = "{name}"',
            'season = "cooling"',
            f"outdoor_db = {ts(db)}",
            f"outdoor_wb = {ts(wb)}",
        ]
    return "\n".join(lines) + "\n"


def write(path: Path, site: Site, rows: list[dict[str, str]], comments: list[str]) -> None:
    text = head(site, comments)
    for r in rows:
        text += "\n[[unit]]\n" + "\n".join(f"{k} = {v}" for k, v in r.items()) + "\n"
    path.parent.mkdir(exist_ok=True)
    path.write_text(text, encoding="utf-8")


def remark(site: Site) -> str:
    t = {"0.1": "to a tenth", "0.5": "to half a degree", "1": "whole"}[site.temp]
    load = {"0.1": "to a tenth", "1": "whole"}[site.load]
    gas = "CoolProp HumidAir" if isinstance(site.air, RealGas) else "psychrolib"
    digits = f"temperatures {t}, loads {load}, airflows to {site.flow}"
    return f"Careful rows: {digits}. Moist air by {gas}. Made by make_rows.py."


# ------------------------------------------------------------------ careful: what is decided

A = Site(
    "sea-level-standard-tenths",
    "Row set A",
    system="IP",
    altitude=0,
    basis="standard",
    temp="0.1",
    load="0.1",
    flow="10",
    engine="perfect",
    weather=[("summer", 93.0, 76.0)],
)
A_ROWS: list[Row] = [
    {
        "tag": "A-1",
        "serves": "Offices, mixed air, variable volume",
        "q": 12400,
        "qo": 2480,
        "room": (75.0, 50),
        "rise": 2.0,
        "duct": 1.0,
        "ptot": 4.6,
        "eta": 66,
        "lat": 52.3,
        "lat_rh": 95,
        "margin": 3,
        "spare": 3,
        "control": "airflow",
        "state_velocity": True,
    },
    {
        "tag": "A-2",
        "serves": "Assembly, constant volume",
        "q": 8650,
        "qo": 3200,
        "room": (75.0, 50),
        "rise": 1.5,
        "duct": 0.5,
        "ptot": 3.9,
        "eta": 64,
        "lat": 53.1,
        "lat_rh": 94,
        "margin": 5,
        "spare": 2,
        "control": "reheat",
    },
    {
        "tag": "A-3",
        "serves": "Laboratories, all outdoor, reheat to neutral",
        "q": 6200,
        "qo": 6200,
        "ptot": 5.2,
        "eta": 65,
        "lat": 51.4,
        "lat_rh": 97,
        "margin": 2,
        "reheat": 70.0,
        "rows": 8,
        "fins": 11,
        "vel": 430,
    },
    {
        "tag": "A-4",
        "serves": "Corridors, all outdoor through an energy wheel",
        "q": 7200,
        "qo": 7200,
        "exhaust": 6500,
        "wheel": (72, 68),
        "room": (75.0, 50),
        "ptot": 5.6,
        "eta": 66,
        "lat": 52.8,
        "lat_rh": 96,
        "margin": 4,
        "no_loads": True,
        "rows": 8,
    },
    {
        "tag": "A-5",
        "serves": "Kitchen, blow-through",
        "q": 5450,
        "qo": 1640,
        "room": (76.0, 50),
        "rise": 1.0,
        "duct": 0.5,
        "blow": True,
        "ptot": 3.4,
        "eta": 61,
        "lat": 54.2,
        "lat_rh": 93,
        "margin": 3,
        "spare": 4,
    },
    {
        "tag": "A-6",
        "serves": "Library, face and bypass of mixed air",
        "q": 9400,
        "qo": 1880,
        "room": (74.0, 50),
        "rise": 2.0,
        "duct": 1.0,
        "ptot": 4.0,
        "eta": 64,
        "lat": 50.6,
        "lat_rh": 96,
        "bypass": 12,
        "margin": 4,
        "spare": 2,
        "control": "bypass",
        "rows": 8,
    },
    {
        "tag": "A-7",
        "serves": "Data hall, no outdoor air",
        "q": 15800,
        "qo": 0,
        "room": (75.0, 45),
        "rise": 14.0,
        "ptot": 2.1,
        "eta": 68,
        "lat": 60.4,
        "dry": True,
        "margin": 2,
        "spare": 3,
        "no_latent": True,
        "water": (50, 62),
        "rows": 6,
        "fins": 8,
    },
    {
        "tag": "A-8",
        "serves": "Retail rooftop, dx, net capacity",
        "q": 4050,
        "qo": 810,
        "room": (75.0, 50),
        "rise": 1.0,
        "ptot": 2.4,
        "eta": 57,
        "lat": 54.6,
        "lat_rh": 92,
        "margin": 6,
        "spare": 3,
        "dx": 95.0,
        "net": True,
        "rows": 4,
        "fins": 13,
        "vel": 380,
    },
    {
        "tag": "A-9",
        "serves": "Classrooms, leaving air stated at the unit",
        "q": 7850,
        "qo": 2350,
        "room": (75.0, 50),
        "rise": 1.5,
        "duct": 1.0,
        "ptot": 3.7,
        "eta": 63,
        "lat": 52.2,
        "lat_rh": 95,
        "lat_unit": True,
        "margin": 3,
        "spare": 2,
        "control": "airflow",
    },
]

B = Site(
    "2000ft-site-half-degrees",
    "Row set B",
    system="IP",
    altitude=2000,
    basis="site",
    temp="0.5",
    load="0.1",
    flow="5",
    engine="real",
    weather=[("peak", 95.0, 74.0), ("damp", 79.0, 71.0)],
)
B_ROWS: list[Row] = [
    {
        "tag": "B-1",
        "serves": "Offices, mixed air, variable volume",
        "q": 10840,
        "qo": 2168,
        "room": (75.0, 50),
        "rise": 2.0,
        "duct": 1.0,
        "ptot": 4.3,
        "eta": 66,
        "lat": 52.7,
        "lat_rh": 95,
        "margin": 4,
        "spare": 3,
        "control": "airflow",
    },
    {
        "tag": "B-2",
        "serves": "Clinic, constant volume with reheat",
        "q": 6315,
        "qo": 1893,
        "room": (74.0, 50),
        "rise": 1.0,
        "duct": 0.5,
        "ptot": 4.8,
        "eta": 65,
        "lat": 51.6,
        "lat_rh": 96,
        "margin": 2,
        "spare": 3,
        "control": "reheat",
    },
    {
        "tag": "B-3",
        "serves": "Fume hoods, all outdoor with run-around",
        "q": 4780,
        "qo": 4780,
        "exhaust": 5020,
        "wheel": (48, 0),
        "ret_rh": (75.0, 50),
        "ptot": 5.4,
        "eta": 64,
        "lat": 52.4,
        "lat_rh": 96,
        "margin": 3,
        "rows": 8,
    },
    {
        "tag": "B-4",
        "serves": "Theatre, bypass of return air",
        "q": 8230,
        "qo": 2470,
        "room": (75.0, 50),
        "rise": 1.0,
        "duct": 0.5,
        "ptot": 3.6,
        "eta": 63,
        "lat": 51.2,
        "lat_rh": 95,
        "bypass": 14,
        "bypass_return": True,
        "margin": 3,
        "spare": 3,
        "control": "bypass",
    },
    {
        "tag": "B-5",
        "serves": "Shop rooftop, dx",
        "q": 3175,
        "qo": 635,
        "room": (75.0, 50),
        "ptot": 2.2,
        "eta": 56,
        "lat": 55.3,
        "lat_rh": 92,
        "margin": 7,
        "spare": 3,
        "dx": 95.0,
        "rows": 4,
        "vel": 370,
    },
    {
        "tag": "B-6",
        "serves": "Archive, return state given, no room",
        "q": 2860,
        "qo": 430,
        "ret_wb": (72.0, 59.5),
        "ptot": 3.3,
        "eta": 60,
        "lat": 50.3,
        "lat_rh": 96,
        "margin": 4,
        "rows": 8,
    },
]

C = Site(
    "5280ft-actual-tenths",
    "Row set C",
    system="IP",
    altitude=5280,
    basis="actual",
    temp="0.1",
    load="0.1",
    flow="10",
    engine="real",
    weather=[("summer", 92.0, 63.5)],
)
C_ROWS: list[Row] = [
    {
        "tag": "C-1",
        "serves": "Offices, mixed air, variable volume",
        "q": 11300,
        "qo": 2150,
        "room": (75.0, 50),
        "rise": 2.0,
        "duct": 1.0,
        "ptot": 4.1,
        "eta": 66,
        "lat": 52.1,
        "lat_rh": 95,
        "margin": 3,
        "spare": 3,
        "control": "airflow",
    },
    {
        "tag": "C-2",
        "serves": "Gallery, blow-through",
        "q": 6850,
        "qo": 1380,
        "room": (73.0, 50),
        "rise": 1.0,
        "duct": 0.5,
        "blow": True,
        "ptot": 3.8,
        "eta": 63,
        "lat": 52.6,
        "lat_rh": 95,
        "margin": 2,
        "spare": 3,
    },
    {
        "tag": "C-3",
        "serves": "Laboratories, all outdoor, coil runs dry",
        "q": 5600,
        "qo": 5600,
        "ptot": 4.7,
        "eta": 64,
        "lat": 56.0,
        "dry": True,
        "margin": 4,
        "rows": 6,
    },
    {
        "tag": "C-4",
        "serves": "Server room, no outdoor air",
        "q": 9100,
        "qo": 0,
        "room": (74.0, 42),
        "rise": 16.0,
        "ptot": 1.9,
        "eta": 66,
        "lat": 58.9,
        "dry": True,
        "margin": 3,
        "spare": 2,
        "no_latent": True,
        "water": (48, 60),
    },
    {
        "tag": "C-5",
        "serves": "Lobby, leaving air at the unit, bypass of mixed air",
        "q": 7650,
        "qo": 1900,
        "room": (75.0, 50),
        "rise": 1.5,
        "duct": 0.5,
        "ptot": 3.5,
        "eta": 62,
        "lat": 50.4,
        "lat_rh": 95,
        "bypass": 10,
        "lat_unit": True,
        "margin": 3,
        "spare": 3,
    },
    {
        "tag": "C-6",
        "serves": "Training, coil airflow stated",
        "q": 5250,
        "qo": 1580,
        "room": (75.0, 50),
        "rise": 1.0,
        "ptot": 3.6,
        "eta": 62,
        "lat": 50.8,
        "lat_rh": 96,
        "bypass": 10,
        "state_cool_airflow": True,
        "margin": 4,
        "spare": 3,
        "control": "bypass",
    },
]

D = Site(
    "7000ft-standard-whole",
    "Row set D",
    system="IP",
    altitude=7000,
    basis="standard",
    temp="1",
    load="1",
    flow="10",
    engine="perfect",
    weather=[("summer", 86.0, 61.0), ("damp", 68.0, 59.0)],
)
D_ROWS: list[Row] = [
    {
        "tag": "D-1",
        "serves": "Offices, mixed air, variable volume",
        "q": 13420,
        "qo": 2690,
        "room": (75.0, 50),
        "rise": 2.0,
        "duct": 1.0,
        "ptot": 4.4,
        "eta": 66,
        "lat": 52.4,
        "lat_rh": 95,
        "margin": 4,
        "spare": 4,
        "control": "airflow",
    },
    {
        "tag": "D-2",
        "serves": "Hall, constant volume",
        "q": 7770,
        "qo": 1550,
        "room": (74.0, 50),
        "rise": 2.0,
        "duct": 1.0,
        "ptot": 3.9,
        "eta": 64,
        "lat": 53.3,
        "lat_rh": 94,
        "margin": 5,
        "spare": 3,
    },
    {
        "tag": "D-3",
        "serves": "Chemistry, all outdoor, coil runs dry",
        "q": 6120,
        "qo": 6120,
        "ptot": 4.6,
        "eta": 64,
        "lat": 55.4,
        "dry": True,
        "margin": 3,
    },
    {
        "tag": "D-4",
        "serves": "Computer room, no outdoor air",
        "q": 8840,
        "qo": 0,
        "room": (74.0, 45),
        "rise": 12.0,
        "ptot": 1.8,
        "eta": 66,
        "lat": 61.4,
        "dry": True,
        "margin": 4,
        "spare": 3,
        "no_latent": True,
        "water": (52, 62),
    },
    {
        "tag": "D-5",
        "serves": "Dining, blow-through",
        "q": 5230,
        "qo": 1310,
        "room": (75.0, 50),
        "rise": 1.0,
        "blow": True,
        "ptot": 3.2,
        "eta": 61,
        "lat": 53.6,
        "lat_rh": 95,
        "margin": 3,
        "spare": 4,
    },
    {
        "tag": "D-6",
        "serves": "Bank, rooftop dx, net capacity",
        "q": 3340,
        "qo": 500,
        "room": (75.0, 50),
        "rise": 1.0,
        "ptot": 2.0,
        "eta": 57,
        "lat": 55.7,
        "lat_rh": 92,
        "margin": 6,
        "spare": 4,
        "dx": 90.0,
        "net": True,
        "rows": 4,
        "vel": 390,
    },
]

E = Site(
    "sea-level-si-tenths",
    "Row set E",
    system="SI",
    altitude=0,
    basis="standard",
    temp="0.1",
    load="0.1",
    flow="10",
    engine="real",
    weather=[("peak", 33.0, 23.0), ("damp", 26.0, 22.0)],
)
E_ROWS: list[Row] = [
    {
        "tag": "E-1",
        "serves": "Offices, mixed air, variable volume",
        "q": 5200,
        "qo": 1350,
        "room": (24.0, 50),
        "rise": 1.0,
        "duct": 0.5,
        "ptot": 1050,
        "eta": 67,
        "lat": 11.7,
        "lat_rh": 95,
        "margin": 3,
        "spare": 3,
        "control": "airflow",
    },
    {
        "tag": "E-2",
        "serves": "Hotel corridors, all outdoor, wrap-around",
        "q": 2100,
        "qo": 2100,
        "ptot": 1250,
        "eta": 64,
        "lat": 11.2,
        "lat_rh": 97,
        "wrap": 4.0,
        "margin": 3,
        "rows": 8,
    },
    {
        "tag": "E-3",
        "serves": "Theatre, series coils",
        "q": 3600,
        "qo": 1800,
        "room": (24.0, 50),
        "rise": 0.5,
        "ptot": 1150,
        "eta": 66,
        "lat": 10.6,
        "lat_rh": 97,
        "pre": (17.5, 93),
        "margin": 3,
        "spare": 4,
        "rows": 4,
    },
    {
        "tag": "E-4",
        "serves": "Wards, all outdoor, energy wheel and reheat",
        "q": 2750,
        "qo": 2750,
        "exhaust": 2600,
        "wheel": (75, 70),
        "ret_rh": (24.0, 50),
        "ptot": 1300,
        "eta": 66,
        "lat": 12.3,
        "lat_rh": 96,
        "reheat": 19.0,
        "margin": 2,
        "rows": 8,
    },
    {
        "tag": "E-5",
        "serves": "Store, room loads without leaving air",
        "q": 1850,
        "qo": 280,
        "room": (23.0, 50),
        "rise": 0.5,
        "ptot": 780,
        "eta": 61,
        "lat": 11.6,
        "lat_rh": 95,
        "no_lat": True,
        "margin": 2,
        "spare": 0,
    },
    {
        "tag": "E-6",
        "serves": "Museum, blow-through",
        "q": 4100,
        "qo": 620,
        "room": (21.0, 50),
        "rise": 1.0,
        "duct": 0.5,
        "blow": True,
        "ptot": 900,
        "eta": 65,
        "lat": 10.4,
        "lat_rh": 95,
        "margin": 4,
        "spare": 2,
    },
]

F = Site(
    "1610m-actual-si-half-degrees",
    "Row set F",
    system="SI",
    altitude=1610,
    basis="actual",
    temp="0.5",
    load="0.1",
    flow="5",
    engine="perfect",
    weather=[("summer", 33.0, 18.5)],
)
F_ROWS: list[Row] = [
    {
        "tag": "F-1",
        "serves": "Offices, mixed air, variable volume",
        "q": 4870,
        "qo": 1070,
        "room": (24.0, 50),
        "rise": 1.0,
        "duct": 0.5,
        "ptot": 950,
        "eta": 66,
        "lat": 11.8,
        "lat_rh": 95,
        "margin": 4,
        "spare": 3,
        "control": "airflow",
    },
    {
        "tag": "F-2",
        "serves": "Seminar, return state given",
        "q": 3125,
        "qo": 940,
        "ret_rh": (25.0, 48),
        "ptot": 880,
        "eta": 64,
        "lat": 12.2,
        "lat_rh": 95,
        "margin": 3,
    },
    {
        "tag": "F-3",
        "serves": "Data hall, no outdoor air",
        "q": 6440,
        "qo": 0,
        "room": (24.0, 42),
        "rise": 9.0,
        "ptot": 480,
        "eta": 67,
        "lat": 15.8,
        "dry": True,
        "margin": 3,
        "spare": 3,
        "no_latent": True,
        "water": (10, 16),
    },
    {
        "tag": "F-4",
        "serves": "Restaurant, dx rooftop",
        "q": 1765,
        "qo": 440,
        "room": (24.0, 50),
        "rise": 0.5,
        "ptot": 520,
        "eta": 57,
        "lat": 12.7,
        "lat_rh": 93,
        "dx": 35.0,
        "margin": 5,
        "spare": 3,
        "rows": 4,
        "vel": 1.9,
    },
    {
        "tag": "F-5",
        "serves": "Laboratory, all outdoor through run-around coils",
        "q": 2435,
        "qo": 2435,
        "exhaust": 2435,
        "wheel": (52, 0),
        "ret_rh": (23.0, 45),
        "ptot": 1100,
        "eta": 64,
        "lat": 12.4,
        "dry": True,
        "margin": 4,
    },
]

G = Site(
    "2130m-site-si-whole",
    "Row set G",
    system="SI",
    altitude=2130,
    basis="site",
    temp="1",
    load="0.1",
    flow="10",
    engine="real",
    weather=[("summer", 30.0, 18.0)],
)
G_ROWS: list[Row] = [
    {
        "tag": "G-1",
        "serves": "Offices, mixed air, variable volume",
        "q": 6030,
        "qo": 1330,
        "room": (24.0, 50),
        "rise": 1.0,
        "duct": 0.5,
        "ptot": 900,
        "eta": 66,
        "lat": 11.6,
        "lat_rh": 95,
        "margin": 4,
        "spare": 3,
        "control": "airflow",
    },
    {
        "tag": "G-2",
        "serves": "Hall, constant volume",
        "q": 3480,
        "qo": 1040,
        "room": (24.0, 50),
        "rise": 1.0,
        "ptot": 800,
        "eta": 63,
        "lat": 12.3,
        "lat_rh": 94,
        "margin": 5,
        "spare": 3,
    },
    {
        "tag": "G-3",
        "serves": "Canteen, blow-through",
        "q": 2570,
        "qo": 770,
        "room": (24.0, 50),
        "rise": 1.0,
        "blow": True,
        "ptot": 750,
        "eta": 62,
        "lat": 12.4,
        "lat_rh": 95,
        "margin": 3,
        "spare": 4,
    },
    {
        "tag": "G-4",
        "serves": "Server room, no outdoor air",
        "q": 3920,
        "qo": 0,
        "room": (23.0, 42),
        "rise": 9.0,
        "ptot": 450,
        "eta": 66,
        "lat": 15.6,
        "dry": True,
        "margin": 4,
        "spare": 3,
        "no_latent": True,
        "water": (10, 15),
    },
    {
        "tag": "G-5",
        "serves": "Library, bypass of mixed air",
        "q": 4240,
        "qo": 850,
        "room": (23.0, 50),
        "rise": 1.0,
        "ptot": 820,
        "eta": 64,
        "lat": 10.3,
        "lat_rh": 96,
        "bypass": 10,
        "margin": 4,
        "spare": 3,
        "control": "bypass",
        "water": (5, 11),
    },
]

H = Site(
    "5280ft-standard-whole",
    "Row set H",
    system="IP",
    altitude=5280,
    basis="standard",
    temp="1",
    load="0.1",
    flow="5",
    engine="real",
    weather=[("summer", 93.0, 64.0)],
    by_pressure=True,
)
H_ROWS: list[Row] = [
    {
        "tag": "H-1",
        "serves": "Offices, mixed air, variable volume",
        "q": 9635,
        "qo": 2410,
        "room": (75.0, 50),
        "rise": 2.0,
        "duct": 1.0,
        "ptot": 4.2,
        "eta": 65,
        "lat": 52.3,
        "lat_rh": 95,
        "margin": 3,
        "spare": 3,
        "control": "airflow",
    },
    {
        "tag": "H-2",
        "serves": "Workshop, constant volume",
        "q": 15480,
        "qo": 2320,
        "room": (76.0, 50),
        "rise": 1.0,
        "duct": 1.0,
        "ptot": 3.6,
        "eta": 66,
        "lat": 54.4,
        "lat_rh": 93,
        "margin": 4,
        "spare": 4,
    },
    {
        "tag": "H-3",
        "serves": "Corridors, all outdoor, energy wheel",
        "q": 4385,
        "qo": 4385,
        "exhaust": 4100,
        "wheel": (70, 66),
        "ret_rh": (75.0, 50),
        "ptot": 5.3,
        "eta": 64,
        "lat": 52.6,
        "lat_rh": 96,
        "margin": 3,
        "rows": 8,
    },
    {
        "tag": "H-4",
        "serves": "Return state given, no room",
        "q": 2245,
        "qo": 560,
        "ret_wb": (77.0, 62.0),
        "ptot": 3.0,
        "eta": 60,
        "lat": 53.2,
        "lat_rh": 95,
        "margin": 5,
    },
    {
        "tag": "H-5",
        "serves": "Rooftop, dx",
        "q": 3965,
        "qo": 595,
        "room": (75.0, 50),
        "rise": 1.0,
        "ptot": 2.3,
        "eta": 57,
        "lat": 54.8,
        "lat_rh": 92,
        "margin": 6,
        "spare": 3,
        "dx": 95.0,
        "rows": 4,
        "vel": 390,
    },
    {
        "tag": "H-6",
        "serves": "Courtroom, leaving air at the unit",
        "q": 5115,
        "qo": 1280,
        "room": (74.0, 50),
        "rise": 1.0,
        "duct": 0.5,
        "ptot": 3.8,
        "eta": 63,
        "lat": 51.7,
        "lat_rh": 95,
        "lat_unit": True,
        "margin": 3,
        "spare": 3,
    },
    {
        "tag": "H-7",
        "serves": "Two alike, blow-through, motor outside",
        "q": 6745,
        "qo": 1350,
        "quantity": 2,
        "room": (75.0, 50),
        "rise": 1.0,
        "blow": True,
        "motor_out": True,
        "ptot": 3.5,
        "eta": 63,
        "lat": 53.4,
        "lat_rh": 95,
        "margin": 4,
        "spare": 3,
    },
]

N = Site(
    "2000ft-mixed-basis-whole",
    "Row set I",
    system="IP",
    altitude=2000,
    basis="standard",
    temp="1",
    load="1",
    flow="10",
    engine="perfect",
    weather=[("peak", 96.0, 75.0), ("humid", 86.0, 77.0)],
    rated="humid",
)
N_ROWS: list[Row] = [
    {
        "tag": "I-1",
        "serves": "Offices, governed by the humid day",
        "q": 11260,
        "qo": 1690,
        "room": (75.0, 50),
        "rise": 2.0,
        "duct": 1.0,
        "ptot": 4.2,
        "eta": 66,
        "lat": 53.3,
        "lat_rh": 95,
        "margin": 7,
        "spare": 3,
        "control": "airflow",
    },
    {
        "tag": "I-2",
        "serves": "Hall, actual airflow",
        "basis": "actual",
        "q": 8430,
        "qo": 1680,
        "room": (75.0, 50),
        "rise": 1.0,
        "ptot": 3.7,
        "eta": 64,
        "lat": 52.7,
        "lat_rh": 95,
        "margin": 7,
        "spare": 3,
    },
    {
        "tag": "I-3",
        "serves": "Kitchen make-up, all outdoor",
        "q": 5310,
        "qo": 5310,
        "ptot": 3.4,
        "eta": 61,
        "lat": 54.6,
        "lat_rh": 97,
        "margin": 6,
        "rows": 8,
    },
    {
        "tag": "I-4",
        "serves": "Site-density airflow, bypass of return air",
        "basis": "site",
        "q": 7220,
        "qo": 1440,
        "room": (75.0, 50),
        "rise": 1.0,
        "ptot": 3.6,
        "eta": 63,
        "lat": 51.4,
        "lat_rh": 95,
        "bypass": 12,
        "bypass_return": True,
        "margin": 7,
        "spare": 3,
    },
    {
        "tag": "I-5",
        "serves": "Print room, room loads without leaving air",
        "q": 3180,
        "qo": 320,
        "room": (75.0, 50),
        "rise": 1.0,
        "ptot": 3.1,
        "eta": 60,
        "lat": 53.2,
        "lat_rh": 94,
        "no_lat": True,
        "margin": 6,
        "spare": 0,
    },
]

CAREFUL = [
    (A, A_ROWS),
    (B, B_ROWS),
    (C, C_ROWS),
    (D, D_ROWS),
    (E, E_ROWS),
    (F, F_ROWS),
    (G, G_ROWS),
    (H, H_ROWS),
    (N, N_ROWS),
]


def careful() -> None:
    for site, units in CAREFUL:
        write(
            HERE / "careful" / f"{site.name}.toml",
            site,
            [write_row(site, u) for u in units],
            [remark(site)],
        )


# ---------------------------------------------------- mistakes: one each, in a careful row


def vav(**kw: Any) -> Row:
    return {
        "tag": "AHU-1",
        "serves": "Offices, mixed air, variable volume",
        "q": 11800,
        "qo": 2360,
        "room": (75.0, 50),
        "rise": 2.0,
        "duct": 1.0,
        "ptot": 4.4,
        "eta": 66,
        "lat": 52.4,
        "lat_rh": 95,
        "margin": 3,
        "spare": 3,
        "control": "airflow",
        **kw,
    }


def hall(**kw: Any) -> Row:
    return {
        "tag": "AHU-2",
        "serves": "Hall, constant volume",
        "q": 7300,
        "qo": 2190,
        "room": (74.0, 50),
        "rise": 1.5,
        "duct": 0.5,
        "ptot": 3.8,
        "eta": 64,
        "lat": 53.2,
        "lat_rh": 94,
        "margin": 4,
        "spare": 3,
        "state_velocity": True,
        **kw,
    }


def doas(**kw: Any) -> Row:
    return {
        "tag": "AHU-3",
        "serves": "Laboratories, all outdoor air",
        "q": 5400,
        "qo": 5400,
        "ptot": 4.8,
        "eta": 64,
        "lat": 53.6,
        "lat_rh": 96,
        "margin": 3,
        "rows": 8,
        "vel": 420,
        **kw,
    }


def blow(**kw: Any) -> Row:
    return {
        "tag": "AHU-4",
        "serves": "Canteen, blow-through",
        "q": 6150,
        "qo": 1540,
        "room": (75.0, 50),
        "rise": 1.0,
        "duct": 0.5,
        "blow": True,
        "ptot": 4.0,
        "eta": 62,
        "lat": 53.4,
        "lat_rh": 94,
        "margin": 2,
        "spare": 3,
        **kw,
    }


def dry(**kw: Any) -> Row:
    return {
        "tag": "AHU-5",
        "serves": "Server room, no outdoor air",
        "q": 9200,
        "qo": 0,
        "room": (75.0, 45),
        "rise": 12.0,
        "ptot": 2.0,
        "eta": 66,
        "lat": 60.2,
        "dry": True,
        "margin": 3,
        "spare": 3,
        "no_latent": True,
        "water": (50, 62),
        **kw,
    }


def metric(**kw: Any) -> Row:
    return {
        "tag": "AHU-6",
        "serves": "Offices, mixed air",
        "q": 4800,
        "qo": 1100,
        "room": (24.0, 50),
        "rise": 1.0,
        "duct": 0.5,
        "ptot": 980,
        "eta": 66,
        "lat": 11.8,
        "lat_rh": 95,
        "margin": 3,
        "spare": 3,
        **kw,
    }


def sea(engine: str = "perfect") -> Site:
    return Site(
        "m",
        "Mistakes",
        system="IP",
        altitude=0,
        basis="standard",
        temp="0.1",
        load="0.1",
        flow="10",
        engine=engine,
        weather=[("summer", 93.0, 76.0)],
    )


def mile(basis: str) -> Site:
    return Site(
        "m",
        "Mistakes",
        system="IP",
        altitude=5280,
        basis=basis,
        temp="0.1",
        load="0.1",
        flow="10",
        engine="real",
        weather=[("summer", 92.0, 63.5)],
    )


def si() -> Site:
    return Site(
        "m",
        "Mistakes",
        system="SI",
        altitude=150,
        basis="standard",
        temp="0.1",
        load="0.1",
        flow="10",
        engine="real",
        weather=[("summer", 33.0, 23.5)],
    )


def num(cells: dict[str, str], key: str) -> float:
    return float(cells[key])


def scale(cells: dict[str, str], k: float, *keys: str) -> None:
    """Multiply cells and print them with the digits they had."""
    for key in keys:
        digits = len(cells[key].partition(".")[2])
        cells[key] = to_step(
            num(cells, key) * k, "0." + "0" * (digits - 1) + "1" if digits else "1"
        )


LOADS = ("cool_total", "cool_sensible", "cool_tons", "cool_flow")


def swap(text: str, i: int) -> str:
    """Change the places of two neighbouring digits."""
    return text[:i] + text[i + 1] + text[i] + text[i + 2 :]


class Mistakes:
    """Each call writes one file: careful rows, one of them broken."""

    def __init__(self) -> None:
        self.n = 0

    def __call__(
        self, name: str, site: Site, units: list[Row], mistake: str, cell: str, **new: str
    ) -> None:
        self.make(name, site, units, mistake, cell, lambda rows: rows[0].update(new))

    def make(
        self, name: str, site: Site, units: list[Row], mistake: str, cell: str, act: Any
    ) -> None:
        self.n += 1
        rows = [write_row(site, u) for u in units]
        before = [dict(r) for r in rows]
        act(rows)
        changed = [
            f"{r['tag']} {k}: {b.get(k, 'blank')} -> {r.get(k, 'blank')}".replace('"', "")
            for r, b in zip(rows, before, strict=True)
            for k in {**b, **r}
            if r.get(k) != b.get(k)
        ]
        comments = [f"mistake: {mistake}", f"cell: {cell}", *(f"was: {x}" for x in changed)]
        write(HERE / "mistakes" / f"{self.n:02d}-{name}.toml", site, rows, comments)


def mistakes() -> None:  # noqa: C901, PLR0915 - a list
    m = Mistakes()
    s = sea()

    def first(act: Any) -> Any:
        return lambda rows: act(rows[0])

    def set_to(**kw: str) -> Any:
        return lambda rows: rows[0].update(kw)

    m.make(
        "entering-wet-bulb-copied",
        s,
        [vav(), doas()],
        "entering wet bulb copied from the all-outdoor unit AHU-3",
        "AHU-1 entering wet bulb",
        lambda rows: rows[0].update(cool_eat_wb=rows[1]["cool_eat_wb"]),
    )
    m.make(
        "entering-wet-bulb-copied-near",
        s,
        [vav(), hall()],
        "entering wet bulb copied from AHU-2, a unit with more outdoor air",
        "AHU-1 entering wet bulb",
        lambda rows: rows[0].update(cool_eat_wb=rows[1]["cool_eat_wb"]),
    )
    m.make(
        "tons-of-sensible",
        s,
        [vav(), hall()],
        "tons are the sensible MBH over 12, not the total",
        "AHU-1 tons",
        first(lambda c: c.update(cool_tons=to_step(num(c, "cool_sensible") / 12, "0.1"))),
    )
    m.make(
        "tons-old-selection",
        s,
        [vav(), hall()],
        "tons left over from an earlier selection, 6 % lower",
        "AHU-1 tons",
        first(lambda c: scale(c, 0.94, "cool_tons")),
    )
    m.make(
        "sensible-above-total",
        s,
        [vav(), hall()],
        "sensible typed with a wrong first digit, above the total",
        "AHU-1 sensible",
        first(
            lambda c: c.update(
                cool_sensible=str(int(c["cool_sensible"][0]) + 3) + c["cool_sensible"][1:]
            )
        ),
    )
    m.make(
        "leaving-wet-above-dry",
        s,
        [vav(), hall()],
        "leaving wet bulb and dry bulb changed places",
        "AHU-1 leaving dry and wet bulb",
        first(lambda c: c.update(cool_lat_db=c["cool_lat_wb"], cool_lat_wb=c["cool_lat_db"])),
    )
    m.make(
        "entering-wet-above-dry",
        s,
        [vav(), hall()],
        "entering wet bulb mistyped, 86 for 66",
        "AHU-1 entering wet bulb",
        first(lambda c: c.update(cool_eat_wb="8" + c["cool_eat_wb"][1:])),
    )
    m.make(
        "outdoor-above-supply",
        s,
        [hall(), vav()],
        "outdoor airflow with one digit too many, above the supply",
        "AHU-2 outdoor airflow",
        set_to(outdoor_airflow="21900"),
    )

    # altitude
    def wrongly(k: float) -> Any:
        return first(lambda c: scale(c, k, *LOADS))

    d = mile("standard")
    m.make(
        "standard-taken-as-actual",
        d,
        [vav(), hall()],
        "airflow is standard air, but the coil was sized with it as actual air at 5 280 ft",
        "AHU-1 loads, tons and water flow (density ratio 0.823 too low)",
        wrongly(d.ratio),
    )
    d = mile("site")
    m.make(
        "corrected-twice",
        d,
        [vav(), hall()],
        "density ratio applied twice to the coil's loads",
        "AHU-1 loads, tons and water flow",
        wrongly(d.ratio),
    )
    m.make(
        "not-corrected",
        d,
        [vav(), hall()],
        "airflow at site density, but loads with sea-level factors",
        "AHU-1 loads, tons and water flow",
        wrongly(1 / d.ratio),
    )
    m.make(
        "lapse-density-ratio",
        d,
        [vav(), hall()],
        "density ratio of the lapsing atmosphere (0.855) in place of p/p0 (0.823)",
        "AHU-1 loads, tons and water flow",
        wrongly(1 / (1 - 6.8754e-6 * 5280)),
    )
    m.make(
        "mixed-at-sea-level",
        d,
        [vav(), hall()],
        "entering wet bulb from a sea-level chart",
        "AHU-1 entering wet bulb",
        first(lambda c: c.update(cool_eat_wb=sea_level_wet_bulb(d))),
    )

    # fan heat
    def no_fan(c: dict[str, str]) -> None:
        u = kept[0]
        got = u["_got"]
        c["cool_eat_db"] = to_step(got["mixed"]["t"], "0.1")
        c["cool_eat_wb"] = to_step(s.air.wb(got["mixed"]["t"], got["mixed"]["w"]), "0.1")

    kept = [blow(), vav()]
    m.make(
        "fan-heat-left-out-entering",
        s,
        kept,
        "blow-through: entering air is the mixed air, the fan's rise forgotten; loads are right",
        "AHU-4 entering dry and wet bulb",
        first(no_fan),
    )

    def no_fan_all(c: dict[str, str]) -> None:
        no_fan(c)
        got = kept[0]["_got"]
        total, sens = got["total"] - got["fan_heat"], got["sens"] - got["fan_heat"]
        c.update(
            cool_total=to_step(total * 1.02, "0.1"),
            cool_sensible=to_step(sens * 1.02, "0.1"),
            cool_tons=to_step(total * 1.02 / 12, "0.1"),
            cool_flow=up_to_step(water_flow(s, total * 1.02, 44, 56, customary=True), "0.1"),
        )

    kept = [blow(), vav()]
    m.make(
        "fan-heat-left-out-loads",
        s,
        kept,
        "blow-through: the fan's heat left out of entering air and of the coil's loads",
        "AHU-4 entering air, total, sensible, tons, water flow",
        first(no_fan_all),
    )

    def net(c: dict[str, str]) -> None:
        heat = kept[0]["_got"]["fan_heat"]
        for key in ("cool_total", "cool_sensible"):
            c[key] = to_step(num(c, key) - heat, "0.1")
        c["cool_tons"] = to_step(num(c, "cool_total") / 12, "0.1")

    kept = [hall(dx=95.0), vav()]
    m.make(
        "net-for-gross",
        s,
        kept,
        "net capacities (fan heat taken off) in a schedule that means gross",
        "AHU-2 total, sensible, tons",
        first(net),
    )

    # all-outdoor
    m.make(
        "all-outdoor-entering-mixed",
        s,
        [doas(), vav()],
        "all-outdoor unit with the mixed-air state of AHU-1 as entering air; loads are right",
        "AHU-3 entering dry and wet bulb",
        lambda rows: rows[0].update(
            cool_eat_db=rows[1]["cool_eat_db"], cool_eat_wb=rows[1]["cool_eat_wb"]
        ),
    )

    def as_mixed(rows: list[dict[str, str]]) -> None:
        got, other = kept[0]["_got"], kept[1]["_got"]
        e, lv = other["entering"], got["leaving"]
        total = s.load_of(got["ms"], e["h"] - lv["h"]) * 1.03
        sens = s.load_of(got["ms"], s.air.h(e["t"], lv["w"]) - lv["h"]) * 1.03
        rows[0].update(
            cool_eat_db=rows[1]["cool_eat_db"],
            cool_eat_wb=rows[1]["cool_eat_wb"],
            cool_total=to_step(total, "0.1"),
            cool_sensible=to_step(sens, "0.1"),
            cool_tons=to_step(total / 12, "0.1"),
            cool_flow=up_to_step(water_flow(s, total, 44, 56, customary=True), "0.1"),
        )

    kept = [doas(), vav()]
    m.make(
        "all-outdoor-sized-on-mixed",
        s,
        kept,
        "all-outdoor unit selected at the mixed-air state of AHU-1",
        "AHU-3 entering air and the loads that follow",
        as_mixed,
    )
    m.make(
        "duplicate-tag",
        s,
        [hall(), vav()],
        "AHU-1 stands twice, AHU-2 was meant",
        "AHU-2 tag",
        lambda rows: rows[0].update(tag='"AHU-1"'),
    )

    # units
    m.make(
        "kw-for-mbh-total",
        s,
        [vav(), hall()],
        "total in kW in the MBH column",
        "AHU-1 total",
        first(lambda c: scale(c, 0.29307107, "cool_total")),
    )
    m.make(
        "kw-for-mbh-both",
        s,
        [vav(), hall()],
        "total and sensible in kW in the MBH columns",
        "AHU-1 total and sensible",
        first(lambda c: scale(c, 0.29307107, "cool_total", "cool_sensible")),
    )
    m.make(
        "litres-for-cfm",
        s,
        [vav(), hall()],
        "supply airflow in L/s in the cfm column",
        "AHU-1 supply airflow",
        first(lambda c: scale(c, 0.4719474, "supply_airflow")),
    )
    m.make(
        "litres-for-cfm-all",
        s,
        [vav(), hall()],
        "all airflows of the row in L/s",
        "AHU-1 supply, outdoor, required, return airflow",
        first(
            lambda c: scale(
                c,
                0.4719474,
                "supply_airflow",
                "outdoor_airflow",
                "outdoor_required",
                "return_airflow",
            )
        ),
    )
    cel = lambda x: to_step((float(x) - 32) / 1.8, "0.1")  # noqa: E731
    m.make(
        "celsius-entering",
        s,
        [vav(), hall()],
        "entering dry bulb in degrees Celsius",
        "AHU-1 entering dry bulb",
        first(lambda c: c.update(cool_eat_db=cel(c["cool_eat_db"]))),
    )
    m.make(
        "celsius-entering-both",
        s,
        [vav(), hall()],
        "entering dry and wet bulb in degrees Celsius",
        "AHU-1 entering dry and wet bulb",
        first(
            lambda c: c.update(cool_eat_db=cel(c["cool_eat_db"]), cool_eat_wb=cel(c["cool_eat_wb"]))
        ),
    )
    m.make(
        "celsius-leaving",
        s,
        [vav(), hall()],
        "leaving dry bulb in degrees Celsius",
        "AHU-1 leaving dry bulb",
        first(lambda c: c.update(cool_lat_db=cel(c["cool_lat_db"]))),
    )
    m.make(
        "celsius-leaving-both",
        s,
        [vav(), hall()],
        "leaving dry and wet bulb in degrees Celsius",
        "AHU-1 leaving dry and wet bulb",
        first(
            lambda c: c.update(cool_lat_db=cel(c["cool_lat_db"]), cool_lat_wb=cel(c["cool_lat_wb"]))
        ),
    )
    x = si()
    fah = lambda v: to_step(float(v) * 1.8 + 32, "0.1")  # noqa: E731
    m.make(
        "fahrenheit-leaving-si",
        x,
        [metric()],
        "leaving dry and wet bulb in Fahrenheit in a metric schedule",
        "AHU-6 leaving dry and wet bulb",
        first(
            lambda c: c.update(cool_lat_db=fah(c["cool_lat_db"]), cool_lat_wb=fah(c["cool_lat_wb"]))
        ),
    )
    m.make(
        "mbh-for-kw-si",
        x,
        [metric()],
        "total and sensible in MBH in the kW columns",
        "AHU-6 total and sensible",
        first(lambda c: scale(c, 3.41214, "cool_total", "cool_sensible")),
    )
    m.make(
        "m3h-for-litres-si",
        x,
        [metric()],
        "supply airflow in m3/h in the L/s column",
        "AHU-6 supply airflow",
        first(lambda c: scale(c, 3.6, "supply_airflow")),
    )
    m.make(
        "factor-12-total",
        s,
        [vav(), hall()],
        "total in tons in the MBH column",
        "AHU-1 total",
        first(lambda c: scale(c, 1 / 12, "cool_total")),
    )
    m.make(
        "factor-12-tons",
        s,
        [vav(), hall()],
        "tons column holds MBH",
        "AHU-1 tons",
        first(lambda c: c.update(cool_tons=c["cool_total"])),
    )
    m.make(
        "factor-1000-total",
        s,
        [vav(), hall()],
        "total in Btu/h in the MBH column",
        "AHU-1 total",
        first(lambda c: scale(c, 1000, "cool_total")),
    )
    m.make(
        "watts-for-kw-si",
        x,
        [metric()],
        "total and sensible in W in the kW columns",
        "AHU-6 total and sensible",
        first(lambda c: scale(c, 1000, "cool_total", "cool_sensible")),
    )

    # coil
    m.make(
        "face-velocity",
        s,
        [hall(), vav()],
        "face velocity of another coil: not airflow over face area",
        "AHU-2 face velocity",
        set_to(cool_face_velocity="389"),
    )
    m.make(
        "face-area-of-one-of-two",
        s,
        [hall(), vav()],
        "face area of one of two stacked coils",
        "AHU-2 face area",
        first(lambda c: scale(c, 0.5, "cool_face_area")),
    )
    m.make(
        "leaving-colder-than-water",
        s,
        [dry(), vav()],
        "leaving air 48.2 for 60.2 on water of 50, a digit mistyped",
        "AHU-5 leaving dry and wet bulb",
        set_to(cool_lat_db="48.2", cool_lat_wb="47.6"),
    )
    m.make(
        "water-warmer-than-air",
        s,
        [vav(), hall()],
        "entering water typed 54 for 44, warmer than the leaving air",
        "AHU-1 entering water",
        set_to(cool_ewt="54"),
    )
    m.make(
        "leaving-moister",
        s,
        [dry(), vav()],
        "leaving wet bulb of a wet coil (95 %) at a dry coil's dry bulb",
        "AHU-5 leaving wet bulb",
        set_to(cool_lat_wb="59.3"),
    )
    m.make(
        "transposed-total",
        s,
        [vav(), hall()],
        "two digits of the total changed places",
        "AHU-1 total",
        first(lambda c: c.update(cool_total=swap(c["cool_total"], 0))),
    )
    m.make(
        "transposed-total-small",
        s,
        [hall(), vav()],
        "second and third digit of the total changed places",
        "AHU-2 total",
        first(lambda c: c.update(cool_total=swap(c["cool_total"], 1))),
    )
    m.make(
        "transposed-airflow",
        s,
        [hall(), vav()],
        "two digits of the supply airflow changed places, 3700 for 7300",
        "AHU-2 supply airflow",
        first(lambda c: c.update(supply_airflow=swap(c["supply_airflow"], 0))),
    )
    m.make(
        "transposed-outdoor",
        s,
        [hall(), vav()],
        "outdoor airflow 2910 for 2190",
        "AHU-2 outdoor airflow",
        first(lambda c: c.update(outdoor_airflow="2910")),
    )
    m.make(
        "transposed-entering-wet",
        s,
        [hall(), vav()],
        "digits of the entering wet bulb changed places",
        "AHU-2 entering wet bulb",
        first(
            lambda c: c.update(
                cool_eat_wb=c["cool_eat_wb"][0] + c["cool_eat_wb"][3] + "." + c["cool_eat_wb"][1]
            )
        ),
    )
    m.make(
        "transposed-leaving-wet",
        s,
        [vav(), hall()],
        "leaving wet bulb 56.1 for 51.6 (digits changed places)",
        "AHU-1 leaving wet bulb",
        first(
            lambda c: c.update(
                cool_lat_wb=c["cool_lat_wb"][0] + c["cool_lat_wb"][3] + "." + c["cool_lat_wb"][1]
            )
        ),
    )

    # columns
    cols = [
        "cool_eat_db",
        "cool_eat_wb",
        "cool_lat_db",
        "cool_lat_wb",
        "cool_total",
        "cool_sensible",
    ]

    def shift(c: dict[str, str]) -> None:
        old = [c[k] for k in cols]
        c.update(zip(cols[1:], old[:-1], strict=True))
        del c[cols[0]]

    m.make(
        "column-shifted",
        s,
        [vav(), hall()],
        "cooling columns shifted right by one, the first left blank",
        "AHU-1 entering air to sensible",
        first(shift),
    )

    def swapped(c: dict[str, str]) -> None:
        c["cool_total"], c["cool_sensible"] = c["cool_sensible"], c["cool_total"]

    m.make(
        "total-sensible-swapped",
        s,
        [vav(), hall()],
        "total and sensible in each other's column",
        "AHU-1 total and sensible",
        first(swapped),
    )

    def shift_air(c: dict[str, str]) -> None:
        c["outdoor_airflow"], c["return_airflow"] = c["return_airflow"], c["outdoor_airflow"]

    m.make(
        "outdoor-return-swapped",
        s,
        [vav(), hall()],
        "outdoor and return airflow in each other's column",
        "AHU-1 outdoor and return airflow",
        first(shift_air),
    )
    m.make(
        "blank-zero-sensible",
        s,
        [vav(), hall()],
        "blank sensible read as zero",
        "AHU-1 sensible",
        set_to(cool_sensible="0"),
    )
    m.make(
        "blank-zero-outdoor",
        s,
        [vav(), hall()],
        "blank outdoor airflow read as zero",
        "AHU-1 outdoor airflow",
        set_to(outdoor_airflow="0"),
    )
    m.make(
        "blank-zero-total",
        s,
        [vav(), hall()],
        "blank total read as zero",
        "AHU-1 total",
        set_to(cool_total="0"),
    )
    m.make(
        "blank-zero-entering-wet",
        s,
        [vav(), hall()],
        "blank entering wet bulb read as zero",
        "AHU-1 entering wet bulb",
        set_to(cool_eat_wb="0"),
    )
    m.make(
        "blank-zero-leaving",
        s,
        [vav(), hall()],
        "blank leaving wet bulb read as zero",
        "AHU-1 leaving wet bulb",
        set_to(cool_lat_wb="0"),
    )
    m.make(
        "fraction-room-humidity",
        s,
        [vav(), hall()],
        "room humidity as a fraction",
        "AHU-1 room relative humidity",
        set_to(room_rh="0.5"),
    )
    m.make(
        "fraction-bypass",
        s,
        [hall(bypass=12, lat=51.2, control="bypass"), vav()],
        "bypass as a fraction",
        "AHU-2 bypass",
        set_to(bypass="0.12"),
    )
    m.make(
        "fraction-fan-efficiency",
        s,
        [hall(), vav()],
        "fan efficiency as a fraction",
        "AHU-2 fan efficiency",
        set_to(fan_efficiency="0.64"),
    )
    m.make(
        "fraction-motor-efficiency",
        s,
        [blow(), vav()],
        "motor efficiency as a fraction",
        "AHU-4 motor efficiency",
        set_to(motor_efficiency="0.92"),
    )
    m.make(
        "fraction-recovery",
        s,
        [
            doas(
                tag="AHU-7",
                serves="Corridors through an energy wheel",
                wheel=(72, 68),
                exhaust=5000,
                ret_rh=(75.0, 50),
            ),
            vav(),
        ],
        "wheel effectiveness as fractions",
        "AHU-7 recovery effectiveness",
        set_to(recovery_sensible="0.72", recovery_latent="0.68"),
    )
    m.make(
        "outdoor-below-required",
        s,
        [hall(), vav()],
        "outdoor airflow below what is required, by 11 %",
        "AHU-2 required outdoor airflow",
        set_to(outdoor_required="2460"),
    )
    m.make(
        "short-total",
        s,
        [vav(), hall()],
        "coil selected 11 % smaller, 8 % short: total, tons and water flow",
        "AHU-1 total, tons, water flow",
        first(lambda c: scale(c, 0.89, "cool_total", "cool_tons", "cool_flow")),
    )
    m.make(
        "short-total-only-by-a-little",
        s,
        [vav(margin=0), hall()],
        "total 3 % short, tons and water with it",
        "AHU-1 total, tons, water flow",
        first(lambda c: scale(c, 0.97, "cool_total", "cool_tons", "cool_flow")),
    )
    m.make(
        "short-sensible",
        s,
        [vav(), hall()],
        "sensible typed 13 % lower, 10 % short",
        "AHU-1 sensible",
        first(lambda c: scale(c, 0.87, "cool_sensible")),
    )
    m.make(
        "room-sensible-not-met",
        s,
        [vav(), hall()],
        "room's sensible load 15 % above what the row was sized for",
        "AHU-1 room sensible",
        first(lambda c: scale(c, 1.15, "room_sensible")),
    )
    m.make(
        "room-latent-not-met",
        s,
        [hall(), vav()],
        "room's latent load 40 % above what the row was sized for",
        "AHU-2 room latent",
        first(lambda c: scale(c, 1.4, "room_latent")),
    )
    m.make(
        "return-not-supply-less-outdoor",
        s,
        [hall(), vav()],
        "return airflow that with the outdoor air does not make the supply",
        "AHU-2 return airflow",
        set_to(return_airflow="6110"),
    )
    m.make(
        "other-condition",
        Site(
            "m",
            "Mistakes",
            system="IP",
            altitude=0,
            basis="standard",
            temp="0.1",
            load="0.1",
            flow="10",
            engine="real",
            weather=[("summer", 95.0, 75.0), ("damp", 84.0, 78.0)],
        ),
        [doas(), doas(tag="AHU-8", rated="damp")],
        "all-outdoor unit scheduled at the dry-bulb day; the damp day has more enthalpy"
        " (AHU-8 is right for it)",
        "AHU-3, whole cooling row",
        list,  # nothing to change: the row is whole and wrong
    )
    m.make(
        "leaving-at-unit-taken-as-coil",
        s,
        [hall(lat_unit=True), vav()],
        "leaving air stated behind the fan, but the row says at the coil",
        "AHU-2 place of the leaving air",
        first(lambda c: c.pop("cool_lat_at")),
    )


def sea_level_wet_bulb(site: Site) -> str:
    """The entering wet bulb of AHU-1 as one mixes it on a sea-level chart."""
    low = sea("real")
    low.weather = site.weather
    u = vav()
    got = solve(low, u, low.weather[0])
    return to_step(low.air.wb(got["entering"]["t"], got["entering"]["w"]), "0.1")


def bases() -> None:
    """The rows that the mistakes are made in, unbroken."""
    sets = {
        "unbroken-sea-level": (sea(), [vav(), hall(), doas(), blow(), dry()]),
        "unbroken-5280ft-standard": (mile("standard"), [vav(), hall(), blow(), dry()]),
        "unbroken-5280ft-site": (mile("site"), [vav(), hall(), blow(), dry()]),
        "unbroken-si": (si(), [metric()]),
    }
    for name, (site, units) in sets.items():
        write(
            HERE / "careful" / f"{name}.toml",
            site,
            [write_row(site, u) for u in units],
            [remark(site)],
        )


if __name__ == "__main__":
    careful()
    bases()
    mistakes()
