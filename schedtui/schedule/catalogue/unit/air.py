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
        AIRFLOW, "Supply airflow", "SUPPLY", "Air that the supply fan delivers.", core=True
    )
    supply_airflow_min = _air.number(
        AIRFLOW, "Least supply airflow", "LEAST", "Least supply airflow of a variable-volume unit."
    )
    outdoor_airflow = _air.number(
        AIRFLOW, "Outdoor airflow", "OUTDOOR", "Outdoor air that the unit takes in.", core=True
    )
    outdoor_required = _air.number(
        AIRFLOW, "Outdoor air required", "OA REQD", "Outdoor air that its rooms require."
    )
    return_airflow = _air.number(
        AIRFLOW, "Return airflow", "RETURN", "Air that comes back from the rooms to the unit."
    )
    exhaust_airflow = _air.number(
        AIRFLOW, "Exhaust airflow", "EXHAUST", "Air that leaves through the energy recovery."
    )
    heat_airflow = _air.number(
        AIRFLOW, "Heating airflow", "HEATING", "Supply airflow in heating; the supply airflow "
        "when not given.",
    )  # fmt: skip

    room_db = _room.number(
        TEMPERATURE, "Room dry bulb", "DB", "Dry bulb of the room in cooling.", core=True
    )
    room_rh = _room.number(
        PERCENT, "Room relative humidity", "RH",
        "Relative humidity of the room in cooling.", instead_of="room humidity",
    )  # fmt: skip
    room_wb = _room.number(
        TEMPERATURE, "Room wet bulb", "WB",
        "Wet bulb of the room in cooling.", instead_of="room humidity",
    )  # fmt: skip
    room_rh_max = _room.number(
        PERCENT, "Highest room humidity", "RH MAX",
        "Highest relative humidity of the room that is accepted in cooling.",
    )  # fmt: skip
    room_sensible = _room.number(
        LOAD, "Room sensible load", "SENS", "Sensible load of the room that the unit must meet.",
        printed=True,
    )  # fmt: skip
    room_latent = _room.number(
        LOAD, "Room latent load", "LATENT", "Latent load of the room that the unit must meet.",
        printed=True,
    )  # fmt: skip
    room_heat_db = _room.number(
        TEMPERATURE, "Room dry bulb, heating", "HTG DB", "Dry bulb of the room in heating."
    )
    room_heat_rh = _room.number(
        PERCENT, "Room humidity, heating", "HTG RH", "Relative humidity of the room in heating."
    )
    room_heat = _room.number(
        LOAD, "Room heating load", "HEAT", "Heat that the room needs from the unit.", printed=True
    )
    return_rise = _room.number_or(
        0.0, TEMPERATURE_DIFFERENCE, "Return rise", "RET RISE",
        "Warming between room and unit in cooling: plenum, return fan.",
    )  # fmt: skip
    return_db = _room.number(
        TEMPERATURE, "Return dry bulb", "RET DB",
        "Dry bulb of the return air at the unit in cooling, when known.",
    )  # fmt: skip
    return_wb = _room.number(
        TEMPERATURE, "Return wet bulb", "RET WB",
        "Wet bulb of the return air at the unit in cooling.", instead_of="return humidity",
    )  # fmt: skip
    return_rh = _room.number(
        PERCENT, "Return relative humidity", "RET RH",
        "Relative humidity of the return air at the unit in cooling.",
        instead_of="return humidity",
    )  # fmt: skip
    duct_rise = _room.number_or(
        0.0, TEMPERATURE_DIFFERENCE, "Duct rise", "DUCT RISE",
        "Warming between unit and room in cooling.",
    )  # fmt: skip

    recovery_sensible = _recovery.number(
        PERCENT, "Sensible effectiveness", "SENS",
        "Sensible effectiveness of the outdoor air's energy recovery.",
    )  # fmt: skip
    recovery_latent = _recovery.number(
        PERCENT, "Latent effectiveness", "LATENT",
        "Latent effectiveness of the outdoor air's energy recovery.",
    )  # fmt: skip
    recovery_heat_sensible = _recovery.number(
        PERCENT, "Sensible effectiveness, heating", "HTG SENS",
        "Sensible effectiveness in heating; that of cooling when not given.",
    )  # fmt: skip
    recovery_heat_latent = _recovery.number(
        PERCENT, "Latent effectiveness, heating", "HTG LATENT",
        "Latent effectiveness in heating; that of cooling when not given.",
    )  # fmt: skip
    recovery_basis = _recovery.choice(
        ("least flow", "supply"), "Recovery basis", "BASIS",
        "Whether the effectiveness goes with the smaller of both flows or with the supply side.",
    )  # fmt: skip
    recovery_exhaust_min = _recovery.number(
        TEMPERATURE, "Least exhaust temperature", "EXH MIN",
        "Temperature below which the exhaust must not leave the recovery in heating.",
    )  # fmt: skip
    recovery_drop = _recovery.number(
        AIR_PRESSURE, "Recovery air drop", "DROP", "Air pressure drop of the recovery.",
        printed=True,
    )  # fmt: skip
