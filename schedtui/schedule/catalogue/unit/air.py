"""Unit keys: airflows, the room, the return air, and energy recovery."""

from __future__ import annotations

from schedtui.schedule.catalogue.field import Group, In
from schedtui.schedule.catalogue.table import Table
from schedtui.units import AIR_PRESSURE, AIRFLOW, LOAD, PERCENT, TEMPERATURE, TEMPERATURE_DIFFERENCE

_air = In(Group.AIR)
_room = In(Group.ROOM)
_recovery = In(Group.RECOVERY)


class AirSide(Table):
    """The air through the unit and the room it serves."""

    __slots__ = ()
    supply_airflow = _air.number(
        AIRFLOW, "Supply airflow", "SUPPLY", "Air that the supply fan delivers.", core=True,
        headings=(
            "SUPPLY AIRFLOW", "SUPPLY", "SUPPLY AIR", "SUPPLY CFM", "AIRFLOW", "CFM", "L/s",
            "m³/h", "TOTAL AIRFLOW", "TOTAL CFM", "TOTAL SUPPLY AIRFLOW", "MAX SUPPLY AIRFLOW",
            "DESIGN SUPPLY AIRFLOW", "MAX AIRFLOW", "SUPPLY FAN AIRFLOW", "FAN CFM",
            "SUPPLY AIR MAX",
        ),
    )  # fmt: skip
    supply_airflow_min = _air.number(
        AIRFLOW, "Least supply airflow", "LEAST", "Least supply airflow of a variable-volume unit.",
        headings=(
            "SUPPLY AIRFLOW MIN", "MIN SUPPLY AIRFLOW", "MIN SUPPLY", "MIN CFM", "MIN AIRFLOW",
            "LEAST SUPPLY AIRFLOW", "TURNDOWN AIRFLOW",
        ),
    )  # fmt: skip
    outdoor_airflow = _air.number(
        AIRFLOW, "Outdoor airflow", "OUTDOOR", "Outdoor air that the unit takes in.", core=True,
        headings=(
            "OUTDOOR AIRFLOW", "OUTDOOR AIR", "OUTDOOR", "OA", "OA CFM", "MIN OUTDOOR AIR",
            "MIN OUTDOOR AIRFLOW", "MIN OA CFM", "VENTILATION AIRFLOW", "VENTILATION CFM",
            "VENTILATION AIR", "DESIGN OUTDOOR AIR",
        ),
    )  # fmt: skip
    outdoor_required = _air.number(
        AIRFLOW, "Outdoor air required", "OA REQD", "Outdoor air that its rooms require.",
        headings=(
            "OUTDOOR AIR REQUIRED", "REQUIRED OUTDOOR AIR", "REQUIRED OUTDOOR AIRFLOW",
            "REQUIRED VENTILATION", "CODE OUTDOOR AIR",
        ),
    )  # fmt: skip
    return_airflow = _air.number(
        AIRFLOW, "Return airflow", "RETURN", "Air that comes back from the rooms to the unit.",
        headings=("RETURN AIRFLOW", "RETURN AIR", "RETURN CFM", "RETURN", "RA CFM"),
    )  # fmt: skip
    exhaust_airflow = _air.number(
        AIRFLOW, "Exhaust airflow", "EXHAUST", "Air that leaves through the energy recovery.",
        headings=(
            "EXHAUST AIRFLOW", "EXHAUST CFM", "EXHAUST AIR", "RELIEF AIRFLOW",
            "RECOVERY EXHAUST AIRFLOW",
        ),
    )  # fmt: skip
    heat_airflow = _air.number(
        AIRFLOW, "Heating airflow", "HEATING", "Supply airflow in heating; the supply airflow "
        "when not given.",
        headings=(
            "HEATING AIRFLOW", "HEATING CFM", "HEATING SUPPLY AIRFLOW", "SUPPLY AIRFLOW HEATING",
        ),
    )  # fmt: skip

    room_db = _room.number(
        TEMPERATURE, "Room dry bulb", "DB", "Dry bulb of the room in cooling.", core=True,
        headings=(
            "ROOM DB", "ROOM", "ROOM AIR DB", "ROOM COOLING DB", "ROOM SUMMER DB", "ROOM COOLING",
            "ROOM SUMMER",
        ),
    )  # fmt: skip
    room_rh = _room.number(
        PERCENT, "Room relative humidity", "RH",
        "Relative humidity of the room in cooling.", instead_of="room humidity",
        headings=("ROOM RH", "ROOM AIR RH", "ROOM COOLING RH", "ROOM SUMMER RH", "ROOM HUMIDITY"),
    )  # fmt: skip
    room_wb = _room.number(
        TEMPERATURE, "Room wet bulb", "WB",
        "Wet bulb of the room in cooling.", instead_of="room humidity",
        headings=("ROOM WB", "ROOM AIR WB", "ROOM COOLING WB", "ROOM SUMMER WB"),
    )  # fmt: skip
    room_rh_max = _room.number(
        PERCENT, "Highest room humidity", "RH MAX",
        "Highest relative humidity of the room that is accepted in cooling.",
        headings=("ROOM RH MAX", "MAX ROOM RH", "HIGHEST ROOM HUMIDITY", "RH MAX"),
    )  # fmt: skip
    room_sensible = _room.number(
        LOAD, "Room sensible load", "SENS", "Sensible load of the room that the unit must meet.",
        printed=True,
        headings=(
            "ROOM SENSIBLE LOAD", "ROOM SENSIBLE", "ROOM SENSIBLE COOLING LOAD",
            "ROOM COOLING SENSIBLE",
        ),
    )  # fmt: skip
    room_latent = _room.number(
        LOAD, "Room latent load", "LATENT", "Latent load of the room that the unit must meet.",
        printed=True,
        headings=(
            "ROOM LATENT LOAD", "ROOM LATENT", "ROOM LATENT COOLING LOAD", "ROOM COOLING LATENT",
        ),
    )  # fmt: skip
    room_heat_db = _room.number(
        TEMPERATURE, "Room dry bulb, heating", "HTG DB", "Dry bulb of the room in heating.",
        headings=("ROOM HEATING DB", "ROOM WINTER DB", "ROOM HEATING", "ROOM WINTER"),
    )  # fmt: skip
    room_heat_rh = _room.number(
        PERCENT, "Room humidity, heating", "HTG RH", "Relative humidity of the room in heating.",
        headings=("ROOM HEATING RH", "ROOM WINTER RH", "ROOM HUMIDITY HEATING"),
    )  # fmt: skip
    room_heat = _room.number(
        LOAD, "Room heating load", "HEAT", "Heat that the room needs from the unit.", printed=True,
        headings=("ROOM HEATING LOAD", "ROOM HEAT LOSS", "ROOM HEAT", "ROOM HEATING CAPACITY"),
    )  # fmt: skip
    return_rise = _room.number_or(
        0.0, TEMPERATURE_DIFFERENCE, "Return rise", "RET RISE",
        "Warming between room and unit in cooling: plenum, return fan.",
        headings=("RETURN RISE", "RETURN AIR RISE", "PLENUM RISE", "RETURN AIR HEAT GAIN"),
    )  # fmt: skip
    return_db = _room.number(
        TEMPERATURE, "Return dry bulb", "RET DB",
        "Dry bulb of the return air at the unit in cooling, when known.",
        headings=("RETURN AIR DB", "RETURN DB", "RETURN AIR TEMP"),
    )  # fmt: skip
    return_wb = _room.number(
        TEMPERATURE, "Return wet bulb", "RET WB",
        "Wet bulb of the return air at the unit in cooling.", instead_of="return humidity",
        headings=("RETURN AIR WB", "RETURN WB"),
    )  # fmt: skip
    return_rh = _room.number(
        PERCENT, "Return relative humidity", "RET RH",
        "Relative humidity of the return air at the unit in cooling.",
        instead_of="return humidity",
        headings=("RETURN AIR RH", "RETURN RH"),
    )  # fmt: skip
    duct_rise = _room.number_or(
        0.0, TEMPERATURE_DIFFERENCE, "Duct rise", "DUCT RISE",
        "Warming between unit and room in cooling.",
        headings=("DUCT RISE", "SUPPLY DUCT RISE", "DUCT HEAT GAIN"),
    )  # fmt: skip

    recovery_sensible = _recovery.number(
        PERCENT, "Sensible effectiveness", "SENS",
        "Sensible effectiveness of the outdoor air's energy recovery.",
        headings=(
            "RECOVERY SENSIBLE EFFECTIVENESS", "RECOVERY SENSIBLE",
            "RECOVERY COOLING SENSIBLE EFFECTIVENESS", "RECOVERY SUMMER SENSIBLE EFFECTIVENESS",
            "SENSIBLE EFFECTIVENESS",
        ),
    )  # fmt: skip
    recovery_latent = _recovery.number(
        PERCENT, "Latent effectiveness", "LATENT",
        "Latent effectiveness of the outdoor air's energy recovery.",
        headings=(
            "RECOVERY LATENT EFFECTIVENESS", "RECOVERY LATENT",
            "RECOVERY COOLING LATENT EFFECTIVENESS", "RECOVERY SUMMER LATENT EFFECTIVENESS",
            "LATENT EFFECTIVENESS",
        ),
    )  # fmt: skip
    recovery_heat_sensible = _recovery.number(
        PERCENT, "Sensible effectiveness, heating", "HTG SENS",
        "Sensible effectiveness in heating; that of cooling when not given.",
        headings=(
            "HEATING SENSIBLE EFFECTIVENESS", "RECOVERY HEATING SENSIBLE EFFECTIVENESS",
            "RECOVERY HEATING SENSIBLE", "RECOVERY WINTER SENSIBLE EFFECTIVENESS",
            "RECOVERY WINTER SENSIBLE",
        ),
    )  # fmt: skip
    recovery_heat_latent = _recovery.number(
        PERCENT, "Latent effectiveness, heating", "HTG LATENT",
        "Latent effectiveness in heating; that of cooling when not given.",
        headings=(
            "HEATING LATENT EFFECTIVENESS", "RECOVERY HEATING LATENT EFFECTIVENESS",
            "RECOVERY HEATING LATENT", "RECOVERY WINTER LATENT EFFECTIVENESS",
            "RECOVERY WINTER LATENT",
        ),
    )  # fmt: skip
    recovery_basis = _recovery.choice(
        ("least flow", "supply"), "Recovery basis", "BASIS",
        "Whether the effectiveness goes with the smaller of both flows or with the supply side.",
        headings=("RECOVERY BASIS", "BASIS OF EFFECTIVENESS"),
    )  # fmt: skip
    recovery_exhaust_min = _recovery.number(
        TEMPERATURE, "Least exhaust temperature", "EXH MIN",
        "Temperature below which the exhaust must not leave the recovery in heating.",
        headings=(
            "RECOVERY EXHAUST MIN", "LEAST EXHAUST TEMPERATURE", "FROST LIMIT",
            "MIN EXHAUST TEMP",
        ),
    )  # fmt: skip
    recovery_drop = _recovery.number(
        AIR_PRESSURE, "Recovery air drop", "DROP", "Air pressure drop of the recovery.",
        printed=True,
        headings=("RECOVERY DROP", "RECOVERY AIR DROP", "RECOVERY PRESSURE DROP"),
    )  # fmt: skip
