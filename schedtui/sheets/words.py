"""The trade's words on a sheet: abbreviations spelled out, and units in the ways they are printed.

Data and its lookup. Knows no key: which heading means which key stands in the catalogue.
"""

from __future__ import annotations

import re
import unicodedata
from functools import lru_cache

LONGEST = 200  # characters of a heading that are looked at

# Phrases, before a heading is taken apart into words; in this order.
_PHRASES: tuple[tuple[str, str], ...] = (
    (r"\b([osre])\s*/\s*a\b", r"\1a"),
    (r"\bdry[\s-]*bulb(?:\s*temp\w*)?\b|\bd\s*/\s*b\b|\bdbt\b", " db "),
    (r"\bwet[\s-]*bulb(?:\s*temp\w*)?\b|\bw\s*/\s*b\b|\bwbt\b", " wb "),
    (r"\brelative\s+humidity\b", " rh "),
    (r"\bchilled[\s-]*water\b", " chw "),
    (r"\b(?:heating\s+)?hot[\s-]*water\b", " hw "),
    (r"\bpre[\s-]*heat(?:ing|er)?\b", " preheat "),
    (r"\bre[\s-]*heat(?:ing|er)?\b", " reheat "),
    (r"\bpre[\s-]*cool(?:ing|er)?\b", " precool "),
    (r"\bair[\s-]*(?:flow|volume|quantity)(?:\s*rate)?\b", " airflow "),
    (r"\b(?:energy|heat)\s+recovery(?:\s+(?:wheel|unit|ventilator|device))?\b", " recovery "),
    (r"\b(?:heat|enthalpy|energy|thermal|rotary)\s+wheel\b", " recovery "),
    (r"\b(?:outside|outdoor|fresh)[\s-]*air\b", " outdoor air "),
    (r"\b(?:pressure|press|static|head)\s*(?:drop|loss)\b|\bresistance\b", " drop "),
    (r"\b(?:air|coil)\s+on(?:\s+coil)?\b|\bon[\s-]coil\b", " entering air "),
    (r"\b(?:air|coil)\s+off(?:\s+coil)?\b|\boff[\s-]coil\b", " leaving air "),
    (r"\b(total|tot|sensible|sens|latent)\.?\s+heat\b", r"\1 capacity"),
    (r"\bdirect\s+expansion\b", " dx "),
    (r"\bpropylene\s+glycol\b", " glycol "),
    (r"\bethylene\s+glycol\b", " glycol "),
    (r"\b(water|temp\w*|chw|hw)\.?\s+in\b", r" \1 entering "),
    (r"\b(water|temp\w*|chw|hw)\.?\s+out\b", r" \1 leaving "),
    (r"\bair\s+stream\b", " airstream "),
    (r"\bfins?\s*(?:per|/)\s*in(?:ch)?\b", " fpi "),
    (r"\bin\s+air\b(?!\s*stream)", " airstream "),
)

# Words that say the same as others.
_WORDS: dict[str, str] = {
    "eat": "entering air", "lat": "leaving air", "ewt": "entering water", "lwt": "leaving water",
    "edb": "entering db", "ewb": "entering wb", "ldb": "leaving db", "lwb": "leaving wb",
    "eadb": "entering air db", "eawb": "entering air wb", "ladb": "leaving air db",
    "lawb": "leaving air wb", "ent": "entering", "entg": "entering", "enter": "entering",
    "inlet": "entering", "entr": "entering", "lvg": "leaving", "leav": "leaving", "lv": "leaving",
    "leave": "leaving", "outlet": "leaving", "exit": "leaving", "wtr": "water",
    "sens": "sensible", "sen": "sensible", "sh": "sensible", "shc": "sensible capacity",
    "tot": "total", "ttl": "total", "th": "total", "thc": "total capacity", "tc": "total capacity",
    "sc": "sensible capacity", "latent": "latent", "cap": "capacity", "capac": "capacity",
    "duty": "capacity", "clg": "cooling", "cool": "cooling", "cooler": "cooling",
    "cc": "cooling coil", "htg": "heating", "heat": "heating", "heater": "heating", "hc":
    "heating coil", "ph": "preheat", "phc": "preheat coil", "rh": "rh", "rhc": "reheat coil",
    "sa": "supply air", "oa": "outdoor air", "osa": "outdoor air", "ra": "return air",
    "ea": "exhaust air", "outside": "outdoor", "fresh": "outdoor", "fa": "outdoor air",
    "vent": "ventilation", "relief": "exhaust", "apd": "air drop", "wpd": "water drop",
    "pd": "drop", "dp": "drop", "esp": "external static pressure",
    "tsp": "total static pressure", "sp": "static pressure", "ext": "external",
    "tp": "total pressure", "press": "pressure", "pres": "pressure",
    "sf": "supply fan", "rf": "return fan", "ef": "exhaust fan", "mhp": "motor hp",
    "eff": "efficiency", "effic": "efficiency", "effect": "efficiency", "vel": "velocity",
    "effectiveness": "efficiency",
    "fv": "face velocity", "temperature": "temp", "temps": "temp", "temperatures": "temp",
    "qty": "quantity", "quan": "quantity", "number": "no", "num": "no", "nr": "no",
    "minimum": "min", "maximum": "max", "least": "min", "reqd": "required", "req": "required",
    "require": "required", "erv": "recovery", "hrv": "recovery", "hru": "recovery",
    "wheel": "recovery", "hhw": "hw", "lthw": "hw", "lphw": "hw", "hws": "hw", "chws": "chw",
    "filters": "filter", "coils": "coil", "motors": "motor", "units": "unit", "row": "rows",
    "fin": "fins", "space": "room", "zone": "room", "indoor": "room", "amb": "ambient",
    "equip": "equipment", "eqpt": "equipment", "desig": "designation",
    "sym": "symbol", "identifier": "id", "loc": "location",
    "serving": "serves", "serve": "serves", "served": "serves", "elec": "electric",
    "electrical": "electrical", "oat": "outdoor air temp", "rat": "return air temp",
    "sat": "supply air temp", "mat": "mixed air", "mix": "mixed", "volume": "airflow",
    "fluid": "fluid", "liquid": "water", "evaporator": "dx", "ref": "reference",
    "vol": "airflow", "remark": "remarks", "comment": "comments", "tonnage": "tons",
    "horsepower": "hp", "humidification": "humidifier", "gty": "quantity", "gr": "gross",
    "conc": "concentration",
}  # fmt: skip

# Words beside which nothing changes its meaning.
NEUTRAL = frozenset((
    "air", "the", "of", "at", "and", "data", "performance", "schedule", "scheduled", "design",
    "rated", "rating", "unit", "ahu", "each", "side", "conditions", "for", "by", "in", "to",
    "with", "information", "general", "handling", "characteristics", "section", "per",
    "selection", "rate", "basis",
))  # fmt: skip

# Units as they are printed, with the label that the units package knows; in this order.
_UNITS: tuple[tuple[str, str], ...] = (
    (r"°\s*f\b|\bdeg(?:rees?)?\.?\s*f\b|\bfahrenheit\b", "°F"),
    (r"°\s*c\b|\bdeg(?:rees?)?\.?\s*c\b|\bcelsius\b", "°C"),
    (r"\bgr(?:ains)?\s*/\s*lb\b", "gr/lb"),
    (r"(?:\bin(?:ch(?:es)?)?\.?|\")\s*(?:of\s+)?(?:wg|wc|h2o|aq|water)(?:\s*gauge)?\b|\biw[gc]\b",
     "in. wg"),
    (r"\b(?:ft|feet)\.?\s*(?:of\s+)?(?:wg|wc|h2o|hd|head|water)\b", "ft wg"),
    (r"\bmm\s*(?:wg|wc|h2o)\b", "mm wg"),
    (r"\bmh2o\b|\bm\s*(?:wg|hd|head)\b", "m wg"),
    (r"\bfpi\b", "fpi"),
    (r"\b[sa]?cfm\b", "cfm"),
    (r"\bl\s*/\s*s(?:ec)?\b|\blps\b", "L/s"),
    (r"\bl\s*/\s*min\b|\blpm\b", "L/min"),
    (r"\bm3\s*/\s*s(?:ec)?\b|\bcms\b", "m³/s"),
    (r"\bm3\s*/\s*h(?:r|our)?\b|\bcmh\b", "m³/h"),
    (r"\b(?:us)?gpm\b", "gpm"),
    (r"\b(?:mbh|mbtuh?(?:\s*/?\s*hr?)?|kbtuh?(?:\s*/?\s*hr?)?|1000\s*btuh?(?:\s*/?\s*hr?)?)\b",
     "MBH"),
    (r"\bbtuh?(?:\s*/?\s*hr?)?\b", "Btu/h"),
    (r"\btons?\b", "tons"),
    (r"\bkw\b", "kW"),
    (r"\bbhp\b", "bhp"),
    (r"\bhp\b", "hp"),
    (r"\blbs?\s*/\s*h(?:r|our)?\b|\bpph\b", "lb/h"),
    (r"\bkg\s*/\s*h(?:r|our)?\b", "kg/h"),
    (r"\bkg\s*/\s*s\b", "kg/s"),
    (r"\bfpm\b|\bft\s*/\s*min\b", "fpm"),
    (r"\bm\s*/\s*s(?:ec)?\b", "m/s"),
    (r"\bsq\.?\s*ft\b|\bft2\b", "ft²"),
    (r"\bsq\.?\s*m\b|\bm2\b", "m²"),
    (r"\bpsig\b", "psig"),
    (r"\bkpa(?:\s*g(?:auge)?|\(g\))\b", "kPa gauge"),
    (r"\bkpa\b", "kPa"),
    (r"%|\bpercent\b|\bpct\b", "%"),
)  # fmt: skip

# Units that are letters of other words: read so only where nothing else stands.
_ALONE = {
    "f": "°F", "c": "°C", "°": "°", "deg": "°", "k": "K", "w": "W", "pa": "Pa", "bar": "bar",
    "in": "in. wg", '"': "in. wg", "wg": "in. wg", "wc": "in. wg", "ft": "ft wg", "m": "m wg",
    "psi": "psi", "sf": "ft²", "lb/hr": "lb/h", "in wg": "in. wg", "inches": "in. wg",
    "feet": "ft wg", "usgal/min": "gpm", "watts": "W",
}  # fmt: skip
_UNIT_PATTERNS = tuple((re.compile(pattern), label) for pattern, label in _UNITS)
_PHRASE_PATTERNS = tuple((re.compile(pattern), words) for pattern, words in _PHRASES)
UNIT_LABELS = frozenset({label for _, label in _UNITS} | set(_ALONE.values()))


@lru_cache(maxsize=4096)
def plain(text: str) -> str:
    """Return a heading in small letters, its dotted abbreviations joined.

    >>> plain("E.A.T.  D.B. (ºF)")
    'eat db (°f)'
    """
    text = text[:LONGEST].translate({ord("º"): "°", ord("˚"): "°", ord("’"): "'", ord("”"): '"'})
    text = unicodedata.normalize("NFKC", text).casefold().replace("⁄", "/")
    text = re.sub(r"\b(?:[a-z]\.){2,}", lambda found: found[0].replace(".", ""), text)
    text = re.sub(r"\b([a-z])\.([a-z])\b", r"\1\2", text)
    return re.sub(r"\s+", " ", text).strip()


@lru_cache(maxsize=4096)
def unit_alone(text: str) -> str | None:
    """Return the unit that a text is when nothing else is in it, None for other text.

    >>> unit_alone("(IN. W.C.)"), unit_alone("F"), unit_alone("DB")
    ('in. wg', '°F', None)
    """
    bare = plain(text).strip("()[]., ")
    bare = re.sub(r"\.(?=\s|$)", "", bare)
    for pattern, label in _UNIT_PATTERNS:
        if pattern.fullmatch(bare):
            return label
    return _ALONE.get(bare)


@lru_cache(maxsize=4096)
def split_units(text: str) -> tuple[str, tuple[str, ...]]:
    """Return a plain heading without the units in it, and those units.

    >>> split_units("total mbh")
    ('total', ('MBH',))
    """
    found: list[tuple[int, str]] = []
    for pattern, label in _UNIT_PATTERNS:
        hit = pattern.search(text)
        while hit:
            found.append((hit.start(), label))
            text = text[: hit.start()] + " " * len(hit[0]) + text[hit.end() :]
            hit = pattern.search(text)
    return re.sub(r"\s+", " ", text).strip(), tuple(label for _, label in sorted(found))


@lru_cache(maxsize=4096)
def words_of(text: str) -> tuple[str, ...]:
    """Return the words of a plain heading without units, abbreviations spelled out.

    >>> words_of("eat db")
    ('entering', 'air', 'db')
    """
    for pattern, words in _PHRASE_PATTERNS:
        text = pattern.sub(words, text)
    return tuple(
        word
        for token in re.findall(r"[a-z0-9]+|%", text)
        for word in _WORDS.get(token, token).split()
    )


def known_words() -> frozenset[str]:
    """Return every word that has a meaning here, as sheets print it or spelled out."""
    spelled = {word for words in _WORDS.values() for word in words.split()}
    phrases = {word for _, words in _PHRASES for word in re.findall(r"[a-z]{2,}", words)}
    return frozenset(spelled | phrases | set(_WORDS) | NEUTRAL)
