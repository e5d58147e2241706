"""Raised and lowered signs for the two text faces, from the font packages this project installs.

The split files of IBM Plex Mono and Source Sans 3 lack most of them, and those of a fallback face stand at another height
and weight. Both faces hold small digits for fractions, though: here they get the places of superscripts and subscripts.

Run after `npm ci`, with Debian's python3-fonttools and python3-brotli:

    /usr/bin/python3 scripts/fonts/generate.py            writes src/styles/fonts/*.woff2
    /usr/bin/python3 scripts/fonts/generate.py --check    compares them, byte by byte, with what it would write

fontTools 4.38 and Brotli 1.0.9 gave the files that are kept; others may compress differently.
"""

import io
import sys
from pathlib import Path

from fontTools.fontBuilder import FontBuilder
from fontTools.pens.recordingPen import DecomposingRecordingPen
from fontTools.pens.transformPen import TransformPen
from fontTools.pens.ttGlyphPen import TTGlyphPen
from fontTools.ttLib import TTFont
from fontTools.varLib import instancer

ROOT = Path(__file__).resolve().parents[2]
OUT = ROOT / "src/styles/fonts"
MONO = ROOT / "node_modules/@fontsource/ibm-plex-mono/files"
SANS = ROOT / "node_modules/@fontsource-variable/source-sans-3/files"

DIGITS = ["zero", "one", "two", "three", "four", "five", "six", "seven", "eight", "nine"]
SUPERSCRIPTS = [0x2070, 0xB9, 0xB2, 0xB3, *range(0x2074, 0x207A)]
SUBSCRIPTS = list(range(0x2080, 0x208A))
PLUS, MINUS, SUB_H = 0x207A, 0x207B, 0x2095
STYLES = {400: "Regular", 500: "Medium", 600: "SemiBold", 700: "Bold"}
# 2026-01-01, in seconds since 1904: the same files come out whenever they are made.
MADE = 3850070400


class Outlines:
    """Glyphs of one static font, moved and scaled."""

    def __init__(self, font):
        self.font = font
        self.glyphs = font.getGlyphSet()

    def bounds(self, name):
        glyph = self.font["glyf"][name]
        return glyph.xMin, glyph.yMin, glyph.xMax, glyph.yMax

    def advance(self, name):
        return self.font["hmtx"][name][0]

    def moved(self, name, xx=1.0, yy=1.0, dx=0.0, dy=0.0):
        recording = DecomposingRecordingPen(self.glyphs)
        self.glyphs[name].draw(recording)
        pen = TTGlyphPen(None)
        recording.replay(TransformPen(pen, (xx, 0, 0, yy, dx, dy)))
        return pen.glyph()


def bars(boxes):
    """Outlines with straight sides."""
    pen = TTGlyphPen(None)
    for points in boxes:
        pen.moveTo(points[0])
        for point in points[1:]:
            pen.lineTo(point)
        pen.closePath()
    return pen.glyph()


def minus(left, right, middle, stroke):
    low, high = round(middle - stroke / 2), round(middle + stroke / 2)
    return bars([[(left, low), (left, high), (right, high), (right, low)]])


def plus(left, right, middle, stroke):
    half, centre, reach = stroke / 2, (left + right) / 2, (right - left) / 2
    x = [left, round(centre - half), round(centre + half), right]
    y = [round(middle - reach), round(middle - half), round(middle + half), round(middle + reach)]
    return bars(
        [
            [
                (x[1], y[0]), (x[1], y[1]), (x[0], y[1]), (x[0], y[2]), (x[1], y[2]), (x[1], y[3]),
                (x[2], y[3]), (x[2], y[2]), (x[3], y[2]), (x[3], y[1]), (x[2], y[1]), (x[2], y[0]),
            ]
        ]
    )  # fmt: skip


def woff2(family, weight, copyright, glyphs, source):
    """The bytes of a font of these glyphs: {code: (outline, advance)}."""
    names = {code: f"u{code:04X}" for code in sorted(glyphs)}
    font = FontBuilder(1000, isTTF=True)
    font.setupGlyphOrder([".notdef", *names.values()])
    font.setupCharacterMap(names)
    first = next(iter(glyphs.values()))[1]
    outlines = {".notdef": TTGlyphPen(None).glyph(), **{names[c]: glyphs[c][0] for c in names}}
    font.setupGlyf(outlines)
    advances = {".notdef": first, **{names[c]: glyphs[c][1] for c in names}}
    table = font.font["glyf"]
    font.setupHorizontalMetrics(
        {name: (round(advance), getattr(table[name], "xMin", 0)) for name, advance in advances.items()}
    )
    ascent, descent = source["hhea"].ascent, source["hhea"].descent
    font.setupHorizontalHeader(ascent=ascent, descent=descent)
    font.setupNameTable(
        {
            "copyright": copyright,
            "familyName": family,
            "styleName": STYLES[weight],
            "licenseDescription": "SIL Open Font License, Version 1.1",
            "licenseInfoURL": "https://openfontlicense.org",
        }
    )
    font.setupOS2(
        usWeightClass=weight,
        sTypoAscender=ascent,
        sTypoDescender=descent,
        usWinAscent=ascent,
        usWinDescent=-descent,
    )
    font.setupPost(keepGlyphNames=False)
    font.font["head"].created = font.font["head"].modified = MADE
    font.font.recalcTimestamp = False
    font.font.flavor = "woff2"
    out = io.BytesIO()
    font.save(out)
    return out.getvalue()


def mono(weight):
    """Superscripts of Plex Mono: its own 1, 2, 3; the other digits from its numerators, brought to the same size and height."""
    source = TTFont(MONO / f"ibm-plex-mono-latin-{weight}-normal.woff2")
    outlines = Outlines(source)
    # Set closer than the figures they follow, which are 600 wide.
    advance = 372
    shift = (advance - outlines.advance("two")) / 2
    own = {1: "onesuperior", 2: "twosuperior", 3: "threesuperior"}
    _, low, _, high = outlines.bounds("twosuperior")
    _, small_low, _, small_high = outlines.bounds("two.numr")
    scale = (high - low) / (small_high - small_low)
    middle = outlines.advance("two") / 2

    def digit(n):
        if n in own:
            return outlines.moved(own[n], dx=shift)
        name = f"{DIGITS[n]}.numr"
        return outlines.moved(
            name, scale, scale, dx=middle * (1 - scale) + shift, dy=high - small_high * scale
        )

    glyphs = {code: (digit(n), advance) for n, code in enumerate(SUPERSCRIPTS)}
    _, thin, _, thick = outlines.bounds("minus")
    stroke = 0.72 * (thick - thin)
    centre = (low + high) / 2
    glyphs[MINUS] = (minus(53, advance - 53, centre, stroke), advance)
    glyphs[PLUS] = (plus(53, advance - 53, centre, stroke), advance)
    copyright = "Copyright 2017 IBM Corp. (outlines of the digits). Changed: set closer, digits brought to one size, signs added."
    return woff2("Tallybarn Superscripts", weight, copyright, glyphs, source)


def sans(weight):
    """Superscripts but 1, 2, 3, which Source Sans has, and subscripts, from its numerators and denominators."""
    path = SANS / "source-sans-3-latin-wght-normal.woff2"
    source = instancer.instantiateVariableFont(TTFont(path), {"wght": weight})
    heavier = instancer.instantiateVariableFont(TTFont(path), {"wght": min(900, weight + 150)})
    outlines, bold = Outlines(source), Outlines(heavier)
    raised = outlines.bounds("two.u")[3] - outlines.bounds("two.n")[3]
    lowered = -90
    advance = outlines.advance("two.n")
    glyphs = {}
    for n, digit in enumerate(DIGITS):
        if n not in (1, 2, 3):
            name = f"{digit}.n"
            glyphs[SUPERSCRIPTS[n]] = (outlines.moved(name, dy=raised), outlines.advance(name))
        name = f"{digit}.d"
        glyphs[SUBSCRIPTS[n]] = (outlines.moved(name, dy=lowered), outlines.advance(name))
    _, low, _, high = outlines.bounds("two.u")
    left, thin, right, thick = outlines.bounds("minus")
    stroke = 0.8 * (thick - thin)
    reach = 0.31 * (right - left)
    ends = round(advance / 2 - reach), round(advance / 2 + reach)
    glyphs[MINUS] = (minus(*ends, (low + high) / 2, stroke), advance)
    glyphs[PLUS] = (plus(*ends, (low + high) / 2, stroke), advance)
    # Hartree's h: as tall as the digits beside it, from a heavier cut so that its stems keep their weight.
    scale = (outlines.bounds("four.d")[3] + 20) / bold.bounds("h")[3]
    glyphs[SUB_H] = (bold.moved("h", scale, scale, dy=lowered), scale * bold.advance("h"))
    copyright = "Copyright 2010-2024 Adobe (outlines of the digits and of h). Changed: placed as superscripts and subscripts, signs added."
    return woff2("Tallybarn Scripts", weight, copyright, glyphs, source)


FILES = {
    **{f"superscripts-{weight}.woff2": (mono, weight) for weight in (400, 500)},
    **{f"scripts-{weight}.woff2": (sans, weight) for weight in (400, 600, 700)},
}


def main():
    check = sys.argv[1:] == ["--check"]
    differing = []
    for name, (make, weight) in FILES.items():
        made = make(weight)
        path = OUT / name
        if check:
            if not path.exists() or path.read_bytes() != made:
                differing.append(name)
        else:
            path.write_bytes(made)
            print(f"{name}: {len(made)} bytes")
    if differing:
        sys.exit(f"Not what this script makes: {', '.join(differing)}")


main()
