"""Make whole rows: every side of a unit filled, and the same with one cell broken.

Run it by hand from the project's root (``python -m tests.review.rows.make_whole_rows``); it writes
``whole/*.toml`` and ``whole_mistakes/*.toml`` beside itself and gives the same bytes each time.
It knows nothing of schedtui. The cooling side is that of make_rows.py; heating, preheat,
humidifier, water, steam, fuel and plants are added here: glycol by CoolProp's incompressibles,
steam by IAPWS-97. All is computed in full precision and rounded only when a cell is printed.
"""

from __future__ import annotations

import copy
from typing import TYPE_CHECKING, Any

from CoolProp.CoolProp import PropsSI
from iapws import IAPWS97

from tests.review.rows.make_rows import (
    HERE,
    IEC,
    NEMA,
    Row,
    Site,
    head,
    mix,
    state,
    to_step,
    up_to_step,
    warmed,
    water_flow,
    write_row,
)

if TYPE_CHECKING:
    from collections.abc import Callable

Cells = dict[str, str]
Plant = dict[str, Any]
FLUIDS = {
    ("propylene glycol", "mass"): "MPG",
    ("ethylene glycol", "mass"): "MEG",
    ("propylene glycol", "volume"): "APG",
    ("ethylene glycol", "volume"): "AEG",
}
BTU_KW = 3.412141633
FROST = {"IP": 32.0, "SI": 0.0}


class Place(Site):
    """A file with winters beside its summers."""

    def __init__(self, name: str, title: str, **kw: Any) -> None:
        super().__init__(name, title, **kw)
        self.winter: list[tuple[str, float, float]] = kw["winter"]
        self.summer_load: dict[str, int] = kw.get("summer_load", {})
        self.lat: float = kw.get("lat", 52.4 if self.ip else 11.4)


# ------------------------------------------------------------------ winter


def recovered(
    site: Place, u: Row, out: dict[str, float], ret: dict[str, float], mo: float, me: float
) -> dict[str, float]:
    """Outdoor air behind the recovery, held back where the exhaust would frost."""
    es, el = (x / 100 for x in (u["wheel_heat"] if "wheel_heat" in u else u["wheel"]))
    least = min(mo, me)
    t4 = ret["t"] - es * least / me * (ret["t"] - out["t"])
    w4 = ret["w"] - el * least / me * (ret["w"] - out["w"])
    frost = FROST[site.system]
    if t4 < frost and w4 > site.air.w_rh(t4, 100):
        held = (ret["t"] - frost) / (ret["t"] - t4)
        es, el = es * held, el * held
    k = least / mo
    return state(
        site,
        out["t"] - es * k * (out["t"] - ret["t"]),
        out["w"] - el * k * (out["w"] - ret["w"]),
    )


def winter(site: Place, u: Row, cond: tuple[str, float, float], fan_heat: float) -> Row:
    """Carry the winter air through the unit in full precision."""
    air, basis = site.air, u.get("basis", site.basis)
    q, qo = float(u["q_heat"] if "q_heat" in u else u["q"]), float(u["qo"])
    room_t, room_rh = u["room_heat"]
    out = state(site, cond[1], air.w_rh(cond[1], cond[2]))
    ret = state(site, room_t, air.w_rh(room_t, room_rh) if room_rh else out["w"])
    v, ms = air.v(u["lat_heat"], out["w"]), 0.0
    got: Row = {}
    for _ in range(60):
        ms = site.mass(q, basis, v)
        mo = ms if qo == u["q"] else site.mass(qo, basis, air.v(out["t"], out["w"]))
        oa = out
        if "wheel" in u:
            me = site.mass(float(u.get("exhaust", qo)), basis, air.v(ret["t"], ret["w"]))
            oa = recovered(site, u, out, ret, mo, me)
        rec = oa
        got["pre_eat"] = got["pre_load"] = None
        if "preheat" in u and u.get("preheat_at") == "outdoor":
            got["pre_eat"] = oa["t"]
            warm = state(site, u["preheat"], oa["w"])
            got["pre_load"] = site.load_of(mo, warm["h"] - oa["h"])
            oa = warm
        mixed = oa if mo >= ms else mix(site, oa, mo, ret, ms - mo)
        into = warmed(site, mixed, ms, fan_heat) if u.get("blow") else mixed
        if "preheat" in u and u.get("preheat_at") != "outdoor":
            got["pre_eat"] = into["t"]
            warm = state(site, u["preheat"], into["w"])
            got["pre_load"] = site.load_of(ms, warm["h"] - into["h"])
            into = warm
        leaving = state(site, u["lat_heat"], into["w"])
        inlet = mixed if u.get("blow") else leaving
        v_new = air.v(inlet["t"], inlet["w"])
        if abs(v_new - v) < 1e-12:
            break
        v = v_new
    got.update(eat=into["t"], mixed=mixed["t"], load=site.load_of(ms, leaving["h"] - into["h"]))
    got["met"] = site.load_of(ms, leaving["h"] - air.h(room_t, leaving["w"]))
    room_w = air.w_rh(room_t, room_rh) if room_rh else rec["w"]
    got["moisture"] = max(0.0, mo * (room_w - rec["w"])) * (1 if site.ip else 3600)
    return got


# ------------------------------------------------------------------ fluids


def frost_point(site: Site, fluid: str, share: int, by: str) -> float:
    name = f"INCOMP::{FLUIDS[fluid, by]}[{share / 100}]"
    k = PropsSI("T_freeze", "T", 300, "P", 3e5, name)
    return k * 1.8 - 459.67 if site.ip else k - 273.15


def flow_of(site: Site, load: float, ewt: float, lwt: float, u: Row) -> float:
    """gpm of MBH or L/s of kW at the mean temperature; `u` has fluid, share and by."""
    if "fluid" not in u:
        return water_flow(site, load, ewt, lwt, customary=u.get("customary", False))
    mean = (ewt + lwt) / 2
    k = (mean + 459.67) / 1.8 if site.ip else mean + 273.15
    name = f"INCOMP::{FLUIDS[u['fluid'], u['by']]}[{u['share'] / 100}]"
    heat = PropsSI("D", "T", k, "P", 3e5, name) * PropsSI("C", "T", k, "P", 3e5, name)
    watts = load * 293.0710702 if site.ip else load * 1000
    m3s = watts / (heat * abs(lwt - ewt) / (1.8 if site.ip else 1))
    return m3s * (15850.323 if site.ip else 1000)


def share_for(site: Site, fluid: str, by: str, coldest: float) -> int:
    """Return the least share, in steps of 5, that freezes below the coldest it may meet."""
    return next(
        s for s in (25, 30, 35, 40, 45, 50, 55) if frost_point(site, fluid, s, by) <= coldest
    )


def latent(site: Site, gauge: float) -> float:
    """Btu/lb | kJ/kg of saturated steam at a gauge pressure."""
    pa = (gauge + site.p) * 6894.757 if site.ip else gauge * 1000 + site.p
    dry, wet = IAPWS97(P=pa / 1e6, x=1), IAPWS97(P=pa / 1e6, x=0)
    return float(dry.h - wet.h) / (2.326 if site.ip else 1.0)


# ------------------------------------------------------------------ a whole row


def water_cells(site: Place, u: Row, side: str, load: float, c: Cells) -> None:
    """Temperatures, fluid and flow of the heating or preheat coil."""
    ewt, lwt = u.get("hot", (160, 130) if site.ip else (60, 40))
    step = "0.1" if site.ip else "0.01"
    c[f"{side}_ewt"], c[f"{side}_lwt"] = str(ewt), str(lwt)
    fluid: Row = {"customary": u.get("customary_hot", False)}
    glycol = u.get(f"{side}_fluid")
    if glycol:
        by = u.get("by", "mass")
        cold = min(w[1] for w in site.winter) - (5 if site.ip else 3)
        share = share_for(site, glycol, by, cold)
        c[f"{side}_fluid"], c[f"{side}_glycol"] = f'"{glycol}"', str(share)
        fluid = {"fluid": glycol, "by": by, "share": share}
    c[f"{side}_flow"] = up_to_step(flow_of(site, load, lwt, ewt, fluid), step)


def preheat_cells(site: Place, u: Row, got: Row, c: Cells) -> None:
    ts, margin = site.temp_s, 1 + u.get("margin", 4) / 100
    kind = u.get("preheat_kind", "hot water")
    load = to_step(got["pre_load"] * margin, site.load)
    c["preheat_kind"] = f'"{kind}"'
    if u.get("preheat_at"):
        c["preheat_at"] = f'"{u["preheat_at"]}"'
    c["preheat_eat_db"], c["preheat_lat_db"] = ts(got["pre_eat"]), ts(u["preheat"])
    c["preheat_total"] = load
    if kind == "hot water":
        water_cells(site, u, "preheat", float(load), c)


def heating_cells(site: Place, u: Row, c: Cells, fan_heat: float) -> None:
    cold = min(site.winter, key=lambda w: w[1])
    got = winter(site, u, cold, fan_heat)
    u["_winter"] = got
    ts, margin = site.temp_s, 1 + u.get("margin", 4) / 100
    if "q_heat" in u:
        c["heat_airflow"] = to_step(u["q_heat"], site.flow)
    c["room_heat_db"] = ts(u["room_heat"][0])
    if u["room_heat"][1]:
        c["room_heat_rh"] = str(u["room_heat"][1])
    if got["met"] > 0.02 * got["load"] and u.get("room"):
        c["room_heat"] = to_step(got["met"] * 0.97, site.load)
    if u.get("humid"):
        c["humidifier"] = up_to_step(got["moisture"] * 1.04, "1" if site.ip else "0.5")
    if "wheel_heat" in u:
        c["recovery_heat_sensible"] = str(u["wheel_heat"][0])
        if u["wheel_heat"][1]:
            c["recovery_heat_latent"] = str(u["wheel_heat"][1])
    if got["pre_load"]:
        preheat_cells(site, u, got, c)
    kind = u.get("heat", "hot water")
    load = to_step(got["load"] * margin, site.load)
    c["heat_kind"] = f'"{kind}"'
    c["heat_eat_db"], c["heat_lat_db"], c["heat_total"] = ts(got["eat"]), ts(u["lat_heat"]), load
    source_cells(site, u, kind, float(load), c)
    if u.get("by") == "volume":
        c["glycol_by"] = '"volume"'


def source_cells(site: Place, u: Row, kind: str, load: float, c: Cells) -> None:
    """What the heating coil draws on."""
    if kind == "hot water":
        water_cells(site, u, "heat", load, c)
    elif kind == "steam":
        gauge = u.get("steam", 10 if site.ip else 70)
        per = load * 1000 / latent(site, gauge) if site.ip else load * 3600 / latent(site, gauge)
        c["heat_steam"], c["heat_steam_pressure"] = up_to_step(per, "1"), str(gauge)
    elif kind == "electric":
        c["heat_electric"] = up_to_step(load / BTU_KW if site.ip else load, "1")
    elif kind == "gas":
        eff = u.get("gas_eff", 82)
        c["heat_efficiency"] = str(eff)
        c["heat_input"] = up_to_step(load / eff * 100, "1")


def cooling_water_cells(site: Place, u: Row, c: Cells) -> None:
    """Glycol in the cooling coil, or condenser water of a dx unit."""
    step = "0.1" if site.ip else "0.01"
    gross = u["_got"]["total"] * (1 + u.get("margin", 4) / 100)
    if u.get("condenser"):
        c["cool_kind"] = '"dx"'
        ewt, lwt = u["condenser"]
        c["cool_ewt"], c["cool_lwt"] = str(ewt), str(lwt)
        # heat of compression: a quarter on top of the cooling
        c["cool_flow"] = up_to_step(water_flow(site, gross * 1.25, ewt, lwt, False), step)
    glycol = u.get("cool_fluid")
    if glycol:
        ewt, lwt = u["water"]
        by = u.get("by", "mass")
        share = share_for(site, glycol, by, u["cool_cold"])
        c["cool_fluid"], c["cool_glycol"] = f'"{glycol}"', str(share)
        what = {"fluid": glycol, "by": by, "share": share}
        c["cool_flow"] = up_to_step(flow_of(site, gross, ewt, lwt, what), step)
        if by == "volume":
            c["glycol_by"] = '"volume"'


def fan_cells(site: Place, u: Row, c: Cells) -> None:
    """Filter and heating drops, and the external pressure that they leave over."""
    filters, heat = (1.0, 0.12) if site.ip else (250, 30)
    c["filter_drop"], c["heat_air_drop"] = str(filters), str(heat)
    inside = filters + heat + float(c["cool_air_drop"]) + float(c.get("recovery_drop", 0))
    inside += 0.5 if site.ip else 120  # casing, dampers, preheat
    rest = u["ptot"] - inside
    c["fan_external_pressure"] = f"{int(rest * 10) / 10}" if site.ip else str(int(rest / 10) * 10)
    n = u.get("fans", 1)
    shaft = u["_got"]["shaft"] / n
    if n > 1:
        c["fan_count"] = str(n)
    c["fan_power"] = up_to_step(shaft, "0.01" if shaft < 10 else "0.1")
    sizes = NEMA if site.ip else IEC
    if u.get("ec"):
        c["motor_kind"] = '"ec"'
        c["motor_power"] = up_to_step(shaft * 1.2, "0.1")
    else:
        c["motor_power"] = str(next(s for s in sizes if s >= 1.17 * float(c["fan_power"])))


def whole_row(site: Place, u: Row) -> Cells:
    """One row with all its sides: key → the text of its cell."""
    c = write_row(site, u)
    cooling_water_cells(site, u, c)
    heating_cells(site, u, c, u["_got"]["fan_heat"])
    fan_cells(site, u, c)
    if u.get("standby"):
        c["standby"] = str(u["standby"])
    names = []
    if c.get("cool_kind") != '"dx"':
        names.append("chilled glycol" if "cool_fluid" in c else "chilled water")
    if "heat_flow" in c:
        names.append("hot glycol" if "heat_fluid" in c else "hot water")
    if "preheat_flow" in c:
        names.append("hot glycol" if "preheat_fluid" in c else "hot water")
    if c["heat_kind"] == '"steam"' or c.get("preheat_kind") == '"steam"':
        names.append("steam")
    c["plants"] = "[" + ", ".join(f'"{n}"' for n in dict.fromkeys(names)) + "]"
    return c


def plants_of(site: Place, rows: list[Cells], spare: float = 1.05) -> list[Plant]:
    """Plants that carry the running units of the rows, with a little over."""
    out: dict[str, Plant] = {}
    for c in rows:
        n = int(c.get("quantity", "1")) - int(c.get("standby", "0"))
        sides = [("cool", "cooling"), ("heat", "heating"), ("preheat", "heating")]
        for side, serves in sides:
            steam = c.get(f"{side}_kind") == '"steam"'
            if f"{side}_flow" not in c and not steam:
                continue
            if side == "cool" and c.get("cool_kind") == '"dx"':
                continue
            kind = "glycol" if f"{side}_fluid" in c else "water"
            name = f"{'chilled' if side == 'cool' else 'hot'} {kind}" if not steam else "steam"
            p = out.setdefault(name, {"serves": serves, "capacity": 0.0, "flow": 0.0})
            p["capacity"] += n * float(c[f"{side}_total"])
            p["flow"] += n * float(c.get(f"{side}_flow", "0"))
    for p in out.values():
        p["capacity"] = up_to_step(p["capacity"] * spare, "10" if site.ip else "5")
        p["flow"] = up_to_step(p["flow"] * spare, "1" if site.ip else "0.1")
    return [{"name": k, **v} for k, v in out.items()]


def text_of(site: Place, rows: list[Cells], plants: list[Plant], comments: list[str]) -> str:
    text = head(site, comments)
    for name, share in site.summer_load.items():
        mark = f'name = "{name}"\n'
        text = text.replace(mark, f"{mark}sensible_load = {share}\n")
    for name, db, rh in site.winter:
        text += f'\n[[condition]]\nname = "{name}"\nseason = "heating"\n'
        text += f"outdoor_db = {site.temp_s(db)}\noutdoor_rh = {to_step(rh, '1')}\n"
    for p in plants:
        text += f'\n[[plant]]\nname = "{p["name"]}"\nserves = "{p["serves"]}"\n'
        text += f"capacity = {p['capacity']}\n"
        if float(p["flow"]):
            text += f"flow = {p['flow']}\n"
    for r in rows:
        text += "\n[[unit]]\n" + "\n".join(f"{k} = {v}" for k, v in r.items()) + "\n"
    return text


# ------------------------------------------------------------------ kinds of unit


def mixed_air(site: Place, tag: str, serves: str, q: float, qo: float, **kw: Any) -> Row:
    ip = site.ip
    return {
        "tag": tag,
        "serves": serves,
        "q": q,
        "qo": qo,
        "room": (75.0, 50) if ip else (24.0, 50),
        "rise": 2.0 if ip else 1.0,
        "duct": 1.0 if ip else 0.5,
        "ptot": 4.6 if ip else 1100,
        "eta": 66,
        "lat": site.lat,
        "lat_rh": 95,
        "margin": 4,
        "control": "airflow",
        "lat_heat": 95.0 if ip else 33.0,
        "room_heat": (70.0 if ip else 21.0, None),
        **kw,
    }


def all_outdoor(site: Place, tag: str, serves: str, q: float, **kw: Any) -> Row:
    ip = site.ip
    return {
        "tag": tag,
        "serves": serves,
        "q": q,
        "qo": q,
        "ptot": 5.4 if ip else 1300,
        "eta": 65,
        "lat": site.lat,
        "lat_rh": 97,
        "margin": 4,
        "rows": 8,
        "vel": 430 if ip else 2.2,
        "lat_heat": 72.0 if ip else 22.0,
        "preheat": 50.0 if ip else 10.0,
        "room_heat": (70.0 if ip else 21.0, None),
        **kw,
    }


PG, EG = "propylene glycol", "ethylene glycol"


def ip_coast() -> tuple[Place, list[Row]]:
    s = Place(
        "w01-coast-standard",
        "Whole rows, coast",
        **_k("IP", 0, "standard", "0.1"),
        weather=[("summer", 93.0, 76.0), ("shoulder", 80.0, 69.0)],
        summer_load={"shoulder": 75},
        winter=[("winter", 22.0, 80.0), ("mild winter", 38.0, 70.0)],
    )
    wheel = {"wheel": (72, 68), "exhaust": 5400, "ret_rh": (75.0, 50), "ptot": 6.2}
    return s, [
        mixed_air(s, "W-101", "Offices", 12400, 2480, q_heat=7440, margin=3),
        mixed_air(s, "W-102", "Assembly", 8650, 3200, control="reheat", duct=0.5, quantity=2),
        all_outdoor(
            s,
            "W-103",
            "Corridors, wheel",
            6000,
            **wheel,
            room_heat=(70.0, 30),
            lat_heat=75.0,
            **_no("preheat"),
        ),
        all_outdoor(s, "W-104", "Kitchen make-up", 4200, preheat_kind="electric", heat="gas"),
        mixed_air(s, "W-105", "Shop, rooftop", 5200, 900, dx=95.0, heat="gas", lat=54.0),
    ]


def ip_gulf() -> tuple[Place, list[Row]]:
    s = Place(
        "w02-gulf-actual",
        "Whole rows, gulf",
        **_k("IP", 30, "actual", "0.1", "perfect"),
        weather=[("summer", 94.0, 79.0)],
        winter=[("winter", 41.0, 85.0)],
    )
    return s, [
        mixed_air(s, "W-201", "Clinic", 9600, 2600, quantity=3),
        mixed_air(s, "W-202", "Wards, blow-through", 7300, 2190, blow=True, ptot=4.2, eta=62),
        mixed_air(
            s, "W-203", "Data hall", 15800, 800, condenser=(85, 95), heat="electric", lat=56.0
        ),
        all_outdoor(s, "W-204", "Laboratory", 5600, reheat=68.0, **_no("preheat")),
        mixed_air(s, "W-205", "Pool hall", 6400, 3000, heat="heat pump", dx=95.0, lat_heat=90.0),
    ]


def ip_prairie() -> tuple[Place, list[Row]]:
    s = Place(
        "w03-prairie-site",
        "Whole rows, prairie",
        **_k("IP", 2500, "site", "0.1"),
        weather=[("summer", 96.0, 72.0)],
        winter=[("winter", -6.0, 75.0)],
    )
    return s, [
        mixed_air(
            s, "W-301", "School, steam", 11200, 3100, heat="steam", steam=15, preheat=None, margin=5
        ),
        mixed_air(
            s,
            "W-302",
            "Hospital wards",
            9800,
            3900,
            preheat=50.0,
            preheat_kind="steam",
            humid=True,
            room_heat=(72.0, 30),
        ),
        all_outdoor(
            s,
            "W-303",
            "Theatres, glycol preheat",
            5200,
            preheat_fluid=PG,
            heat_fluid=PG,
            humid=True,
            room_heat=(70.0, 35),
        ),
        all_outdoor(
            s,
            "W-304",
            "Animal rooms, plate recovery",
            6800,
            wheel=(62, 0),
            exhaust=6800,
            ret_rh=(76.0, 48),
            ptot=6.2,
            room_heat=(71.0, 35),
            preheat=55.0,
            preheat_kind="electric",
            humid=True,
        ),
        mixed_air(
            s,
            "W-305",
            "Gymnasium",
            14200,
            4200,
            preheat=60.0,
            preheat_at="outdoor",
            preheat_kind="electric",
            fans=2,
        ),
    ]


def ip_mile() -> tuple[Place, list[Row]]:
    s = Place(
        "w04-mile-standard",
        "Whole rows, mile high",
        **_k("IP", 5280, "standard", "0.1"),
        weather=[("summer", 92.0, 61.0), ("damp", 74.0, 58.0)],
        winter=[("winter", 1.0, 70.0)],
    )
    return s, [
        mixed_air(s, "W-401", "Offices", 12600, 2500, q_heat=7600),
        mixed_air(
            s,
            "W-402",
            "Workshop, gas",
            8200,
            2000,
            dx=98.0,
            heat="gas",
            gas_eff=80,
            fans=2,
            vel=430,
        ),
        mixed_air(
            s,
            "W-403",
            "Brewing, glycol",
            7000,
            1500,
            cool_fluid=PG,
            cool_cold=-4.0,
            water=(38, 50),
            heat_fluid=PG,
            lat=50.0,
        ),
        all_outdoor(
            s, "W-404", "Archive make-up", 4000, dry=True, lat=55.0, heat="steam", **_no("preheat")
        ),
        mixed_air(s, "W-405", "Library, blow-through", 9000, 2200, blow=True, ptot=4.0, standby=1)
        | {"quantity": 3},
    ]


def ip_high() -> tuple[Place, list[Row]]:
    s = Place(
        "w05-7000ft-actual-whole",
        "Whole rows, 7 000 ft",
        **_k("IP", 7000, "actual", "1"),
        weather=[("summer", 86.0, 60.0)],
        winter=[("winter", -2.0, 60.0)],
        lat=53.0,
    )
    return s, [
        mixed_air(s, "W-501", "Hotel", 13000, 2600, q_heat=9100, margin=6, ptot=4.0),
        mixed_air(s, "W-502", "Kitchen", 8000, 2800, heat="gas", dx=95.0, margin=7, ptot=4.0),
        mixed_air(s, "W-503", "Hall", 10000, 2000, heat="electric", margin=6, quantity=2),
        mixed_air(s, "W-504", "Hall B", 7000, 1400, blow=True, margin=8, ptot=4.0),
    ]


def ip_high_site() -> tuple[Place, list[Row]]:
    s = Place(
        "w06-7000ft-site",
        "Whole rows, 7 000 ft by pressure",
        **_k("IP", 7000, "site", "0.1", "perfect"),
        by_pressure=True,
        weather=[("summer", 87.0, 59.5)],
        winter=[("winter", -9.0, 65.0)],
    )
    return s, [
        mixed_air(s, "W-601", "Museum", 9200, 1800, humid=True, room_heat=(70.0, 40), q_heat=9200),
        mixed_air(
            s,
            "W-602",
            "Hostel",
            6600,
            3300,
            dry=True,
            lat=54.0,
            wheel=(70, 0),
            exhaust=3200,
            ptot=5.6,
            room_heat=(70.0, 30),
        ),
        mixed_air(s, "W-603", "Store, heat pump", 5000, 900, dx=92.0, heat="heat pump", ec=True),
        all_outdoor(
            s,
            "W-604",
            "Make-up, glycol by volume",
            4800,
            dry=True,
            lat=56.0,
            by="volume",
            preheat_fluid=EG,
            heat_fluid=EG,
        ),
    ]


def si_sea() -> tuple[Place, list[Row]]:
    s = Place(
        "w07-sea-si-standard",
        "Whole rows, metric",
        **_k("SI", 0, "standard", "0.1"),
        weather=[("summer", 33.0, 24.0)],
        winter=[("winter", -5.0, 85.0)],
    )
    return s, [
        mixed_air(s, "W-701", "Offices", 5200, 1300, q_heat=3200),
        mixed_air(s, "W-702", "Theatre", 4000, 1600, control="reheat", quantity=2),
        all_outdoor(
            s,
            "W-703",
            "Flats, wheel",
            2600,
            wheel=(74, 68),
            wheel_heat=(76, 66),
            exhaust=2500,
            ret_rh=(24.5, 50),
            ptot=1600,
            room_heat=(21.0, 35),
            **_no("preheat"),
        ),
        mixed_air(s, "W-704", "Shop, dx", 2400, 500, dx=35.0, heat="electric", lat=12.0),
        mixed_air(
            s, "W-705", "Print works", 3600, 900, humid=True, room_heat=(21.0, 45), heat="gas"
        ),
    ]


def si_hill() -> tuple[Place, list[Row]]:
    s = Place(
        "w08-600m-si-site",
        "Whole rows, metric hills",
        **_k("SI", 600, "site", "0.1", "perfect"),
        weather=[("summer", 32.0, 21.5), ("night", 23.0, 19.5)],
        winter=[("winter", -14.0, 80.0), ("frost", -2.0, 90.0)],
    )
    return s, [
        mixed_air(s, "W-801", "Reading rooms", 5000, 1200, hot=(70, 50)),
        mixed_air(
            s,
            "W-802",
            "Vault, glycol",
            3000,
            300,
            cool_fluid=PG,
            cool_cold=-17.0,
            water=(3, 8),
            lat=9.5,
            humid=True,
            room_heat=(20.0, 40),
            hot=(70, 50),
        ),
        all_outdoor(
            s,
            "W-803",
            "Conservation, plate",
            2200,
            wheel=(65, 0),
            exhaust=2200,
            ret_rh=(25.0, 50),
            ptot=1550,
            room_heat=(21.0, 45),
            preheat=12.0,
            preheat_kind="electric",
            humid=True,
            hot=(70, 50),
        ),
        mixed_air(
            s, "W-804", "Boiler-fed hall, steam", 4200, 1600, heat="steam", steam=100, ptot=1200
        ),
        mixed_air(s, "W-805", "Store", 1800, 300, hot=(70, 50), ec=True, fans=2),
    ]


def si_plateau() -> tuple[Place, list[Row]]:
    s = Place(
        "w09-1600m-si-actual",
        "Whole rows, metric plateau",
        **_k("SI", 1600, "actual", "0.1"),
        weather=[("summer", 33.0, 17.0)],
        winter=[("winter", -18.0, 70.0)],
    )
    return s, [
        mixed_air(s, "W-901", "Airport hall", 8000, 1900, heat_fluid=EG, hot=(70, 50), q_heat=6000),
        mixed_air(
            s,
            "W-902",
            "Hangar",
            6200,
            1800,
            heat="gas",
            gas_eff=91,
            preheat=15.0,
            preheat_at="outdoor",
            preheat_kind="electric",
        ),
        mixed_air(
            s,
            "W-903",
            "Control rooms",
            3000,
            500,
            cool_fluid=EG,
            cool_cold=-20.0,
            water=(4, 9),
            heat="electric",
            lat=10.5,
            quantity=3,
            standby=1,
        ),
        mixed_air(s, "W-904", "Crew rooms, blow-through", 2600, 700, blow=True, hot=(70, 50))
        | {"heat_fluid": EG},
        all_outdoor(
            s,
            "W-905",
            "Paint make-up",
            3000,
            dry=True,
            lat=14.0,
            heat="gas",
            preheat_fluid=EG,
            hot=(70, 50),
        ),
    ]


def si_high() -> tuple[Place, list[Row]]:
    s = Place(
        "w10-2130m-si-half",
        "Whole rows, metric heights",
        **_k("SI", 2130, "standard", "0.5"),
        weather=[("summer", 29.0, 15.5)],
        winter=[("winter", -12.0, 60.0)],
        lat=12.0,
    )
    return s, [
        mixed_air(
            s, "W-1001", "Spa", 3200, 900, vel=2.0, margin=7, preheat=5.0, preheat_at="outdoor"
        )
        | {"preheat_kind": "electric"},
        mixed_air(
            s, "W-1002", "Restaurant", 2800, 800, vel=2.0, margin=7, heat="heat pump", dx=35.0
        ),
        mixed_air(
            s, "W-1003", "Rooms", 4600, 900, vel=2.0, margin=7, heat="steam", steam=50, quantity=2
        ),
    ]


def ip_labs() -> tuple[Place, list[Row]]:
    s = Place(
        "w11-labs-actual-900ft",
        "Whole rows, laboratories",
        **_k("IP", 900, "actual", "0.1"),
        weather=[("summer", 90.0, 74.0)],
        winter=[("winter", -2.0, 80.0)],
    )
    return s, [
        all_outdoor(
            s,
            "W-1101",
            "Laboratories",
            14000,
            preheat_fluid=PG,
            humid=True,
            room_heat=(70.0, 30),
            quantity=3,
            standby=1,
            fans=2,
        ),
        all_outdoor(
            s,
            "W-1102",
            "Vivarium, run-around and steam",
            9000,
            wheel=(48, 0),
            exhaust=9200,
            ret_rh=(74.0, 50),
            ptot=6.4,
            heat="steam",
            humid=True,
            room_heat=(72.0, 35),
            **_no("preheat"),
        ),
        mixed_air(
            s, "W-1103", "Write-up", 8000, 2000, q_heat=5200, preheat=48.0, preheat_kind="steam"
        ),
        mixed_air(
            s,
            "W-1104",
            "Clean room, bypass",
            12000,
            2000,
            bypass=15,
            lat=51.0,
            control="bypass",
            humid=True,
            room_heat=(70.0, 35),
        ),
    ]


def _k(system: str, altitude: int, basis: str, temp: str, engine: str = "real") -> Row:
    load = "0.1" if temp == "0.1" or system == "SI" else "1"
    flow = "10" if system == "IP" else "5"
    return {
        "system": system,
        "altitude": altitude,
        "basis": basis,
        "temp": temp,
        "load": load,
        "flow": flow,
        "engine": engine,
    }


def _no(key: str) -> Row:
    """Take a kind's usual key away: whole_row drops what is None."""
    return {key: None}


FILES = [
    ip_coast,
    ip_gulf,
    ip_prairie,
    ip_mile,
    ip_high,
    ip_high_site,
    si_sea,
    si_hill,
    si_plateau,
    si_high,
    ip_labs,
]


def set_of(make: Callable[[], tuple[Place, list[Row]]]) -> tuple[Place, list[Row], list[Cells]]:
    site, units = make()
    units = [{k: v for k, v in u.items() if v is not None} for u in units]
    return site, units, [whole_row(site, u) for u in units]


def careful() -> None:
    folder = HERE / "whole"
    folder.mkdir(exist_ok=True)
    for make in FILES:
        site, _, rows = set_of(make)
        gas = type(site.air).__name__
        comments = [f"Careful whole rows; moist air: {gas}. Made by make_whole_rows.py."]
        text = text_of(site, rows, plants_of(site, rows), comments)
        (folder / f"{site.name}.toml").write_text(text, encoding="utf-8")


# ------------------------------------------------------------------ whole rows with one mistake


def base_ip(altitude: int = 0, basis: str = "standard") -> Place:
    return Place(
        "m",
        "Whole mistakes",
        **_k("IP", altitude, basis, "0.1"),
        weather=[("summer", 92.0, 74.0) if altitude < 3000 else ("summer", 90.0, 60.0)],
        winter=[("winter", 5.0, 75.0)],
    )


def base_si() -> Place:
    return Place(
        "m",
        "Whole mistakes",
        **_k("SI", 200, "standard", "0.1"),
        weather=[("summer", 32.0, 22.5)],
        winter=[("winter", -10.0, 80.0)],
    )


def units_ip(s: Place) -> list[Row]:
    """Seven units, one of each kind of heating: numbers 1 to 7."""
    dry = s.altitude > 3000  # the air of the heights is drier than the coil would leave it
    vel = 400 if dry else 460
    units = [
        mixed_air(s, "AHU-1", "Offices", 12400, 2480, q_heat=8000),
        mixed_air(s, "AHU-2", "Hall, two alike", 8600, 1900, quantity=2),
        mixed_air(s, "AHU-3", "School, steam", 9400, 2300, heat="steam", steam=15),
        mixed_air(s, "AHU-4", "Workshop, electric", 4200, 800, heat="electric"),
        mixed_air(s, "AHU-5", "Stores, gas", 6800, 1300, heat="gas", dx=95.0),
        all_outdoor(
            s,
            "AHU-6",
            "Wards",
            5200,
            dry=dry,
            preheat_kind="electric",
            heat="hot water",
            humid=True,
            room_heat=(70.0, 35),
        ),
        mixed_air(
            s,
            "AHU-7",
            "Brewing, glycol",
            7000,
            1400,
            cool_fluid=PG,
            cool_cold=0.0,
            water=(38, 50),
            lat=50.5,
            fans=2,
        ),
    ]
    return [{**u, "vel": min(vel, u.get("vel", vel))} for u in units]


def units_si(s: Place) -> list[Row]:
    return [
        mixed_air(s, "AHU-1", "Offices", 5200, 1300, q_heat=3600),
        mixed_air(s, "AHU-2", "Theatre", 4000, 1100, quantity=2),
        mixed_air(s, "AHU-3", "Shop, electric", 2400, 500, heat="electric"),
        mixed_air(s, "AHU-4", "Print works, humidified", 3600, 900, humid=True)
        | {"room_heat": (21.0, 45)},
    ]


class Whole:
    """Each call writes one file: the careful rows that are named, the first with a broken cell."""

    def __init__(self) -> None:
        self.n = 0
        self.sets: dict[str, tuple[Place, list[Row], list[Cells]]] = {
            "gulf": set_of(ip_gulf),
            "frost": set_of(ip_high_site),
        }
        for name, site, units in (
            ("ip", base_ip(), units_ip),
            ("high", base_ip(6000), units_ip),
            ("si", base_si(), units_si),
        ):
            rows = units(site)
            self.sets[name] = (site, rows, [whole_row(site, u) for u in rows])

    def rows(self, of: str, tags: str) -> list[Cells]:
        by_tag = {c["tag"].strip('"')[-1]: c for c in self.sets[of][2]}
        return [copy.deepcopy(by_tag[t]) for t in tags]

    def __call__(
        self,
        name: str,
        of: str,
        tags: str,
        mistake: str,
        cell: str,
        act: Callable[[Cells], Any] | None = None,
        plant: Callable[[list[Plant]], Any] | None = None,
    ) -> None:
        """Write one file; `act` breaks the first row, `plant` the plants."""
        self.n += 1
        site = self.sets[of][0]
        rows = self.rows(of, tags)
        plants = plants_of(site, rows)
        old, old_plants = dict(rows[0]), copy.deepcopy(plants)
        if act:
            act(rows[0])
        if plant:
            plant(plants)
        pairs = [(old["tag"].strip('"'), old, rows[0])]
        pairs += [(a["name"], a, b) for a, b in zip(old_plants, plants, strict=True)]
        was = [
            f"was: {who} {k}: {a.get(k, 'blank')} -> {b.get(k, 'blank')}".replace('"', "")
            for who, a, b in pairs
            for k in {**a, **b}
            if a.get(k) != b.get(k)
        ]
        who = old["tag"].strip('"') + " " if act else ""
        comments = [f"mistake: {mistake}", f"cell: {who}{cell}", *was]
        folder = HERE / "whole_mistakes"
        folder.mkdir(exist_ok=True)
        text = text_of(site, rows, plants, comments)
        (folder / f"{self.n:02d}-{name}.toml").write_text(text, encoding="utf-8")


def times(k: float, *keys: str) -> Callable[[Cells], None]:
    """Multiply cells, keeping their digits."""

    def act(c: Cells) -> None:
        for key in keys:
            text = c[key]
            places = len(text.partition(".")[2])
            c[key] = to_step(float(text) * k, "0." + "0" * (places - 1) + "1" if places else "1")

    return act


def put(**new: str) -> Callable[[Cells], None]:
    return lambda c: c.update(new)


def copied(**pairs: str) -> Callable[[Cells], None]:
    """Give cells another cell's text."""
    return lambda c: c.update({k: c[v] for k, v in pairs.items()})


def plant_times(i: int, key: str, k: float) -> Callable[[list[Plant]], None]:
    def act(plants: list[Plant]) -> None:
        times(k, key)(plants[i])

    return act


def swapped(a: str, b: str) -> Callable[[Cells], None]:
    def act(c: Cells) -> None:
        c[a], c[b] = c[b], c[a]

    return act


def water_mistakes(w: Whole) -> None:
    w(
        "gpm-rise-cooling",
        "ip",
        "12",
        "flow taken with a 15 degree rise, the row prints 12",
        "cooling flow",
        times(0.8, "cool_flow"),
    )
    w(
        "gpm-rise-heating",
        "ip",
        "12",
        "flow taken with a 40 degree drop, the row prints 30",
        "heating flow",
        times(0.75, "heat_flow"),
    )
    w(
        "flow-rise-si",
        "si",
        "12",
        "flow taken with 8 K, the row prints 6",
        "cooling flow",
        times(0.75, "cool_flow"),
    )

    def as_water(c: Cells) -> None:
        site, units, _ = w.sets["ip"]
        got = units[6]["_got"]["total"] * 1.04
        c["cool_flow"] = up_to_step(water_flow(site, got, 38, 50, customary=True), "0.1")

    w(
        "glycol-by-water-factor",
        "ip",
        "71",
        "flow with the 500 of water, the fluid is glycol",
        "cooling flow",
        as_water,
    )
    w(
        "cooling-water-swapped",
        "ip",
        "12",
        "entering and leaving chilled water change places",
        "entering and leaving water",
        swapped("cool_ewt", "cool_lwt"),
    )
    w(
        "heating-water-swapped",
        "ip",
        "12",
        "entering and leaving hot water change places",
        "entering and leaving hot water",
        swapped("heat_ewt", "heat_lwt"),
    )
    w(
        "heating-water-swapped-si",
        "si",
        "12",
        "entering and leaving hot water change places",
        "entering and leaving hot water",
        swapped("heat_ewt", "heat_lwt"),
    )
    w(
        "hot-water-in-celsius",
        "ip",
        "12",
        "entering hot water 71 (160 F in Celsius)",
        "entering hot water",
        put(heat_ewt="71"),
    )
    w(
        "gpm-for-litres",
        "si",
        "12",
        "flow in gpm in the L/s column",
        "cooling flow",
        times(15.850323, "cool_flow"),
    )
    w(
        "litres-for-gpm",
        "ip",
        "12",
        "flow in L/s in the gpm column",
        "cooling flow",
        times(0.0630902, "cool_flow"),
    )
    w(
        "hot-gpm-for-litres",
        "si",
        "12",
        "heating flow in gpm in the L/s column",
        "heating flow",
        times(15.850323, "heat_flow"),
    )
    w(
        "other-chilled-water",
        "ip",
        "12",
        "one unit on 40 to 52 where the loop has 44 to 56",
        "entering and leaving water",
        put(cool_ewt="40", cool_lwt="52"),
    )
    w(
        "other-hot-water",
        "ip",
        "126",
        "one unit on 180 to 150 where the loop has 160 to 130",
        "entering and leaving hot water",
        put(heat_ewt="180", heat_lwt="150"),
    )
    w(
        "glycol-too-weak",
        "ip",
        "71",
        "10 % glycol, freezing at about 26 F, for a coil in 5 F winter",
        "glycol share",
        put(cool_glycol="10"),
    )


def recovery_and_glycol_mistakes(w: Whole) -> None:
    site, units, _ = w.sets["frost"]
    # a return air as dry as outdoors frosts nothing: the entering air of full recovery
    free = winter(site, {**units[1], "room_heat": (70.0, None)}, site.winter[0], 0.0)
    w(
        "frost-overlooked",
        "frost",
        "21",
        "recovery taken in full, though its exhaust would freeze",
        "heating entering air",
        put(heat_eat_db=site.temp_s(free["eat"])),
    )
    w(
        "glycol-share-of-volume",
        "frost",
        "41",
        "share by volume, the cell that says so left blank",
        "glycol by",
        lambda c: c.pop("glycol_by"),
    )

    def hot_as_water(c: Cells) -> None:
        gpm = water_flow(site, float(c["heat_total"]), 130, 160, customary=True)
        c["heat_flow"] = up_to_step(gpm, "0.1")

    w(
        "hot-glycol-by-water-factor",
        "frost",
        "41",
        "flow with the 500 of water, the fluid is glycol",
        "heating flow",
        hot_as_water,
    )
    w(
        "condenser-water-swapped",
        "gulf",
        "31",
        "entering and leaving condenser water of a dx unit change places",
        "entering and leaving water",
        swapped("cool_ewt", "cool_lwt"),
    )
    w(
        "chilled-water-below-freezing",
        "ip",
        "12",
        "entering water typed 24 for 44, no glycol",
        "entering water",
        put(cool_ewt="24"),
    )
    w(
        "glycol-freezes-in-the-coil",
        "ip",
        "71",
        "10 % glycol on a loop typed 22 for 38: it freezes at about 26",
        "entering water and glycol share",
        put(cool_ewt="22", cool_glycol="10"),
    )
    w(
        "dx-ambient-below-outdoors",
        "frost",
        "31",
        "ambient of the dx capacity typed 75, below the summer's outdoor air",
        "ambient",
        put(cool_ambient_db="75.0"),
    )


def fan_mistakes(w: Whole) -> None:
    w(
        "motor-below-shaft",
        "ip",
        "12",
        "motor smaller than the shaft power",
        "motor",
        put(motor_power="10"),
    )
    w(
        "motor-odd",
        "ip",
        "12",
        "a motor of 18 hp, which nobody makes",
        "motor",
        put(motor_power="18"),
    )
    w(
        "motor-odd-si",
        "si",
        "12",
        "a motor of 10 kW, between the sizes",
        "motor",
        put(motor_power="10"),
    )

    def by_external(c: Cells) -> None:
        k = float(c["fan_external_pressure"]) / float(c["fan_total_pressure"])
        times(k, "fan_power")(c)

    w(
        "shaft-from-external",
        "ip",
        "12",
        "shaft power worked with the external pressure",
        "fan power",
        by_external,
    )
    w(
        "shaft-from-standard-flow",
        "high",
        "12",
        "shaft power worked with the standard flow, the fan moves the actual one",
        "fan power",
        times(0.80, "fan_power"),
    )
    w(
        "external-above-total",
        "ip",
        "12",
        "external and total pressure change places",
        "fan pressures",
        swapped("fan_total_pressure", "fan_external_pressure"),
    )
    w(
        "external-high",
        "ip",
        "12",
        "external pressure typed 6.1, above the total",
        "external pressure",
        put(fan_external_pressure="6.1"),
    )
    w(
        "external-leaves-nothing",
        "ip",
        "12",
        "external so high that filters and coil have no share",
        "external pressure",
        put(fan_external_pressure="4.0"),
    )
    w(
        "shaft-kw-for-hp",
        "ip",
        "12",
        "shaft power in kW in the bhp column",
        "fan power",
        times(0.7457, "fan_power"),
    )
    w(
        "shaft-hp-for-kw",
        "si",
        "12",
        "shaft power in hp in the kW column",
        "fan power",
        times(1.341, "fan_power"),
    )
    w(
        "motor-kw-for-hp",
        "ip",
        "12",
        "motor in kW in the hp column (20 hp = 15 kW)",
        "motor",
        put(motor_power="15"),
    )
    w(
        "pascal-total",
        "ip",
        "12",
        "total pressure in Pa in the in. wg column",
        "total pressure",
        put(fan_total_pressure="1145"),
    )
    w(
        "pascal-external",
        "ip",
        "12",
        "external pressure in Pa in the in. wg column",
        "external pressure",
        put(fan_external_pressure="560"),
    )
    w(
        "inches-total-si",
        "si",
        "12",
        "total pressure in in. wg in the Pa column",
        "total pressure",
        put(fan_total_pressure="4.4"),
    )
    w(
        "pascal-filter",
        "ip",
        "12",
        "filter drop in Pa in the in. wg column",
        "filter drop",
        put(filter_drop="250"),
    )
    w(
        "two-fans-power",
        "ip",
        "71",
        "power of both fans in the cell of one",
        "fan power",
        times(2, "fan_power"),
    )
    w(
        "two-fans-as-one",
        "ip",
        "71",
        "two fans scheduled as one",
        "number of fans",
        put(fan_count="1"),
    )


def heating_mistakes(w: Whole) -> None:
    w(
        "heating-eat-of-summer",
        "ip",
        "12",
        "heating entering air copied from the cooling mix",
        "heating entering air",
        copied(heat_eat_db="cool_eat_db"),
    )
    w(
        "heating-eat-of-summer-si",
        "si",
        "12",
        "heating entering air copied from the cooling mix",
        "heating entering air",
        copied(heat_eat_db="cool_eat_db"),
    )
    w(
        "heating-eat-at-full-flow",
        "ip",
        "12",
        "heating entering air mixed with the cooling airflow",
        "heating entering air",
        put(heat_eat_db="57.0"),
    )
    w(
        "heating-mbh-in-kw",
        "ip",
        "12",
        "heating in kW in the MBH column",
        "heating total",
        times(0.29307, "heat_total"),
    )
    w(
        "heating-kw-in-mbh",
        "si",
        "12",
        "heating in MBH in the kW column",
        "heating total",
        times(3.41214, "heat_total"),
    )
    w(
        "heating-short",
        "ip",
        "12",
        "heating 12 % lower, 8 % short",
        "heating total",
        times(0.88, "heat_total"),
    )
    w(
        "heating-short-water-too",
        "ip",
        "12",
        "coil 12 % smaller, its flow with it",
        "heating total and flow",
        times(0.88, "heat_total", "heat_flow"),
    )
    w(
        "heating-short-si",
        "si",
        "12",
        "heating 12 % lower, 8 % short",
        "heating total",
        times(0.88, "heat_total"),
    )
    w(
        "heating-lat-transposed",
        "ip",
        "12",
        "leaving air 59.0 for 95.0",
        "heating leaving air",
        put(heat_lat_db="59.0"),
    )
    w(
        "heating-lat-celsius",
        "ip",
        "12",
        "leaving air 35.0 (95 F in Celsius)",
        "heating leaving air",
        put(heat_lat_db="35.0"),
    )
    w("steam-short", "ip", "31", "steam 12 % lower", "steam flow", times(0.88, "heat_steam"))
    w(
        "steam-kg",
        "ip",
        "31",
        "steam in kg/h in the lb/h column",
        "steam flow",
        times(0.45359, "heat_steam"),
    )
    w(
        "electric-mbh",
        "ip",
        "41",
        "the MBH figure typed again in the kW column",
        "electric kW",
        lambda c: c.update(heat_electric=to_step(float(c["heat_total"]), "1")),
    )
    w(
        "electric-short",
        "ip",
        "41",
        "heater of 12 % less",
        "electric kW",
        times(0.88, "heat_electric"),
    )
    w(
        "electric-short-si",
        "si",
        "31",
        "heater of 12 % less",
        "electric kW",
        times(0.88, "heat_electric"),
    )
    w(
        "gas-input-for-output",
        "ip",
        "51",
        "fuel input typed as the heating capacity",
        "heating total",
        copied(heat_total="heat_input"),
    )
    w(
        "gas-output-for-input",
        "ip",
        "51",
        "output typed as the fuel input",
        "heating input",
        copied(heat_input="heat_total"),
    )
    w(
        "gas-efficiency-fraction",
        "ip",
        "51",
        "efficiency as a fraction",
        "heating efficiency",
        put(heat_efficiency="0.82"),
    )
    w(
        "humidifier-short",
        "ip",
        "61",
        "humidifier 15 % lower",
        "humidifier",
        times(0.85, "humidifier"),
    )
    w(
        "humidifier-kg",
        "ip",
        "61",
        "humidifier in kg/h in the lb/h column",
        "humidifier",
        times(0.45359, "humidifier"),
    )
    w(
        "humidifier-short-si",
        "si",
        "41",
        "humidifier 15 % lower",
        "humidifier",
        times(0.85, "humidifier"),
    )
    w(
        "preheat-short",
        "ip",
        "61",
        "preheat 12 % lower",
        "preheat total",
        times(0.88, "preheat_total"),
    )
    w(
        "preheat-eat-above",
        "ip",
        "61",
        "preheat entering air 15.0 for 5.0",
        "preheat entering air",
        put(preheat_eat_db="15.0"),
    )
    w(
        "heating-eat-before-preheat",
        "ip",
        "61",
        "heating entering air is that of the preheat",
        "heating entering air",
        copied(heat_eat_db="preheat_eat_db"),
    )
    w(
        "room-heat-not-met",
        "ip",
        "12",
        "room needs 20 % more than the row was made for",
        "room heat",
        times(1.2, "room_heat"),
    )
    w(
        "room-heat-not-met-si",
        "si",
        "12",
        "room needs 20 % more than the row was made for",
        "room heat",
        times(1.2, "room_heat"),
    )
    w(
        "freezing-after-preheat",
        "ip",
        "61",
        "preheat to 25.0 where 50.0 was meant",
        "preheat leaving air",
        put(preheat_lat_db="25.0"),
    )

    def no_preheat(c: Cells) -> None:
        total = float(c["preheat_total"]) + float(c["heat_total"])
        c["heat_flow"] = up_to_step(float(c["heat_flow"]) * total / float(c["heat_total"]), "0.1")
        c["heat_total"], c["heat_eat_db"] = to_step(total, "0.1"), c["preheat_eat_db"]
        for k in [k for k in c if k.startswith("preheat")]:
            del c[k]

    w(
        "freezing-no-preheat",
        "ip",
        "61",
        "outdoor air of 5 F straight on a hot water coil",
        "preheat left out",
        no_preheat,
        lambda p: [x.update(capacity="5000", flow="400") for x in p],
    )
    w(
        "heat-airflow-in-litres",
        "ip",
        "12",
        "heating airflow in L/s in the cfm column",
        "heating airflow",
        times(0.4719474, "heat_airflow"),
    )
    w(
        "heat-total-zero",
        "ip",
        "12",
        "blank heating total read as zero",
        "heating total",
        put(heat_total="0"),
    )


def plant_mistakes(w: Whole) -> None:
    rows = w.rows("ip", "12")
    one = [float(c["cool_total"]) for c in rows]
    gpm = [float(c["cool_flow"]) for c in rows]
    hot = [float(c["heat_total"]) for c in rows]
    w(
        "plant-quantity-forgotten",
        "ip",
        "12",
        "AHU-2 is two units, the plant carries one",
        "chilled water capacity",
        plant=lambda p: p[0].update(capacity=up_to_step(sum(one) * 1.05, "10")),
    )
    w(
        "plant-quantity-forgotten-flow",
        "ip",
        "12",
        "AHU-2 is two units, the flow is for one",
        "chilled water flow",
        plant=lambda p: p[0].update(flow=up_to_step(sum(gpm) * 1.05, "1")),
    )
    w(
        "plant-quantity-forgotten-hot",
        "ip",
        "12",
        "AHU-2 is two units, the boiler carries one",
        "hot water capacity",
        plant=lambda p: p[1].update(capacity=up_to_step(sum(hot) * 1.05, "10")),
    )
    w(
        "plant-flow-short",
        "ip",
        "12",
        "flow 15 % lower",
        "chilled water flow",
        plant=plant_times(0, "flow", 0.85),
    )
    w(
        "plant-capacity-short",
        "ip",
        "12",
        "capacity 15 % lower",
        "chilled water capacity",
        plant=plant_times(0, "capacity", 0.85),
    )
    w(
        "plant-hot-flow-short",
        "si",
        "12",
        "flow 15 % lower",
        "hot water flow",
        plant=plant_times(1, "flow", 0.85),
    )
    w(
        "plant-in-tons",
        "ip",
        "12",
        "capacity in tons in the MBH column",
        "chilled water capacity",
        plant=plant_times(0, "capacity", 1 / 12),
    )
    w(
        "plant-kw",
        "ip",
        "12",
        "capacity in kW in the MBH column",
        "hot water capacity",
        plant=plant_times(1, "capacity", 0.29307),
    )
    w(
        "quantity-forgotten",
        "ip",
        "21",
        "two units alike, quantity left blank",
        "quantity",
        lambda c: c.pop("quantity"),
    )
    w("standby-all", "ip", "21", "both of the two units stand by", "standby", put(standby="2"))


def mistakes() -> None:
    w = Whole()
    for name in ("ip", "high", "si"):
        site, _, rows = w.sets[name]
        comments = ["Careful: the rows that the mistakes are made in, unbroken."]
        text = text_of(site, rows, plants_of(site, rows), comments)
        (HERE / "whole" / f"unbroken-{name}.toml").write_text(text, encoding="utf-8")
    water_mistakes(w)
    fan_mistakes(w)
    heating_mistakes(w)
    plant_mistakes(w)
    recovery_and_glycol_mistakes(w)


if __name__ == "__main__":
    careful()
    mistakes()
