"""German: its marks, the words around its numbers, and its small phrases.

Labels, units and levels are the analyst's own and may be of any language, so that no phrase
asks them to be inflected: a value stands after an equals sign, an event in quotation marks.
"""

from __future__ import annotations

from plainodds.phrases.german.messages import MESSAGES
from plainodds.phrases.languages import Language
from plainodds.phrases.lexicon import Lexicon
from plainodds.phrases.numbers import Marks, Wording

__all__ = ["GERMAN"]

# a space that does not break between a number and its sign (DIN 5008)
_SPACE = "\u00a0"

_WORDING = Wording(
    not_known="nicht bekannt",
    infinity="unendlich",
    under="unter {}",
    over="über {}",
    up_to="höchstens {}",
    percent=f"{{}}{_SPACE}{{}}",
    money=f"{{sign}}{{figures}}{_SPACE}{{unit}}",
    out_of="{} von {}",
    apart_in="{} je {}",
    to="{} bis {}",
    both="{} und {}",
    more="{} mehr",
    fewer="{} weniger",
    lower="{} niedriger",
    higher="{} höher",
    no_more_no_fewer="nicht mehr und nicht weniger",
    more_or_fewer_not_known="nicht bekannt wie viele mehr oder weniger",
    points="{} Prozentpunkte",
    just_above="knapp über 0",
    just_below="knapp unter 0",
    between_and_nought="zwischen {} und 0",
)
_LEXICON = Lexicon(
    nouns_keep_capitals=True,
    blank="(leer)",
    yes="ja",
    no="nein",
    unit="Einheit",
    units="Einheiten",
    point="Prozentpunkt",
    points="Prozentpunkte",
    value="{} = {}",
    from_to="von {}",
    against="{} gegenüber {}",
    rather="{} statt {}",
    either_way="unverändert {}",
    given="gegeben {}",
    per_more="je {} mehr",
    per_less="je {} weniger",
    per_additional="je {} mehr",
    or_more="{} oder mehr",
    or_less="{} oder weniger",
    either_or=" oder ",
    interval=" ({}-%-Intervall {})",
    standard_error=", Standardfehler {}",
    no_difference="weder höher noch niedriger",
    points_not_known="um eine nicht bekannte Zahl von Prozentpunkten anders",
    row="1 Zeile",
    rows="{} Zeilen",
    rows_with="{} mit {}",
    rows_masked="{} (durch eine Maske ausgewählt)",
    further="{} weitere",
    that_is="{}, das sind {}",
    below="unter {}",
    between="zwischen {} und {}",
    above="über {}",
    along_all="bei allen Werten von {}",
    for_lines="bei {}: {}",
    data_range="(in den Daten {} bis {})",
    shifted_less="um {} niedriger",
    shifted_more="um {} höher",
    times="mit {} multipliziert",
    and_then=" und dann ",
    than_it_is="{} als jetzt",
    moved="{} (verschoben: {})",
    no_lower="nicht unter {}",
    no_higher="nicht über {}",
    as_it_is="wie jetzt",
    unseen="{} (in keiner Zeile)",
    once_shifted="{name} mancher Zeilen nach der Verschiebung {known}",
    messages=MESSAGES,
)

GERMAN = Language("de", "German", Marks(",", "."), _WORDING, _LEXICON)
"""The point between thousands rather than a narrow space: fonts and programs all know it."""
