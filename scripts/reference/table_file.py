"""How the generators of server/physics/tables write a table: a head of a few keys, then one entry a line, so that reviews can read it."""

import json
from pathlib import Path

ROOT = Path(__file__).resolve().parents[2]
HEAD = ("edition", "source", "licence", "script", "notes")


def _line(value):
    # NaN and infinity are no JSON: fail here, not in the reader.
    return json.dumps(value, ensure_ascii=False, allow_nan=False)


def write_table(place, head, lists):
    """Writes server/physics/tables/`place`. `head`: edition, source, licence, script, notes and what else belongs there; `lists`: name -> entries."""
    for key in HEAD:
        if key not in head:
            raise ValueError(f"the head of {place} lacks {key}")
    parts = [f"  {_line(key)}: {_line(value)}" for key, value in head.items()]
    for name, entries in lists.items():
        lines = ",\n".join(f"    {_line(entry)}" for entry in entries)
        parts.append(f"  {_line(name)}: [\n{lines}\n  ]")
    target = ROOT / "server/physics/tables" / place
    target.parent.mkdir(parents=True, exist_ok=True)
    target.write_text("{\n" + ",\n".join(parts) + "\n}\n", encoding="utf-8")
    print(f"{place}: " + ", ".join(f"{len(entries)} {name}" for name, entries in lists.items()))
