"""How colours come out: for eyes, for paper without colour, and through the widgets' filter.

Sources: Machado, Oliveira & Fernandes 2009 (IEEE TVCG 15:1291), matrices of severity 1.0 in
linear RGB; WCAG 2.2, relative luminance and contrast; CSS Filter Effects 1, invert() and
hue-rotate(); Sharma, Wu & Dalal 2005 (Color Res Appl 30:21), CIEDE2000.
"""

import numpy as np

SIGHT = {
    "normal": np.eye(3),
    "protanopia": np.array(
        [
            [0.152286, 1.052583, -0.204868],
            [0.114503, 0.786281, 0.099216],
            [-0.003882, -0.048116, 1.051998],
        ]
    ),
    "deuteranopia": np.array(
        [
            [0.367322, 0.860646, -0.227968],
            [0.280085, 0.672501, 0.047413],
            [-0.011820, 0.042940, 0.968881],
        ]
    ),
    "tritanopia": np.array(
        [
            [1.255528, -0.076749, -0.178779],
            [-0.078411, 0.930809, 0.147602],
            [0.004733, 0.691367, 0.303900],
        ]
    ),
}
_HALF_TURN = np.array(
    [
        [0.213 - 0.787, 0.715 + 0.715, 0.072 + 0.072],
        [0.213 + 0.213, 0.715 - 0.285, 0.072 + 0.072],
        [0.213 + 0.213, 0.715 + 0.715, 0.072 - 0.928],
    ]
)
_LUMINANCE = np.array([0.2126, 0.7152, 0.0722])
_XYZ = np.array(
    [
        [0.4124564, 0.3575761, 0.1804375],
        [0.2126729, 0.7151522, 0.0721750],
        [0.0193339, 0.1191920, 0.9503041],
    ]
)
_WHITE = np.array([0.95047, 1.0, 1.08883])


def rgb(code):
    """sRGB from 0 to 1 of a colour written as "#rrggbb"."""
    return np.array([int(code[i : i + 2], 16) for i in (1, 3, 5)]) / 255


def filtered(colour):
    """What `filter: invert(1) hue-rotate(180deg)` makes of a colour."""
    return np.clip(_HALF_TURN @ (1 - colour), 0, 1)


def linear(colour):
    return np.where(colour <= 0.04045, colour / 12.92, ((colour + 0.055) / 1.055) ** 2.4)


def luminance(colour):
    return float(_LUMINANCE @ linear(colour))


def contrast(one, other):
    lower, upper = sorted((luminance(one), luminance(other)))
    return (upper + 0.05) / (lower + 0.05)


def lab_of_linear(light):
    t = (_XYZ @ light) / _WHITE
    f = np.where(t > 216 / 24389, np.cbrt(t), (24389 / 27 * t + 16) / 116)
    return np.array([116 * f[1] - 16, 500 * (f[0] - f[1]), 200 * (f[1] - f[2])])


def seen(colour, sight):
    """A colour in Lab, as somebody sees it."""
    return lab_of_linear(np.clip(SIGHT[sight] @ linear(colour), 0, 1))


def grey(colour):
    """A colour in Lab, printed without colour."""
    return lab_of_linear(np.full(3, luminance(colour)))


def difference(one, other):
    """CIEDE2000 of two colours in Lab."""
    (l1, a1, b1), (l2, a2, b2) = one, other
    mean = (np.hypot(a1, b1) + np.hypot(a2, b2)) / 2
    g = 0.5 * (1 - np.sqrt(mean**7 / (mean**7 + 25**7)))
    a1, a2 = a1 * (1 + g), a2 * (1 + g)
    c1, c2 = np.hypot(a1, b1), np.hypot(a2, b2)
    h1, h2 = (np.degrees(np.arctan2(b, a)) % 360 for a, b in ((a1, b1), (a2, b2)))
    turn = 0.0 if c1 * c2 == 0 else (h2 - h1 + 180) % 360 - 180
    d_l, d_c = l2 - l1, c2 - c1
    d_h = 2 * np.sqrt(c1 * c2) * np.sin(np.radians(turn / 2))
    l_m, c_m = (l1 + l2) / 2, (c1 + c2) / 2
    h_m = h1 + h2 if c1 * c2 == 0 else (h1 + turn / 2) % 360
    t = (
        1
        - 0.17 * np.cos(np.radians(h_m - 30))
        + 0.24 * np.cos(np.radians(2 * h_m))
        + 0.32 * np.cos(np.radians(3 * h_m + 6))
        - 0.20 * np.cos(np.radians(4 * h_m - 63))
    )
    s_l = 1 + 0.015 * (l_m - 50) ** 2 / np.sqrt(20 + (l_m - 50) ** 2)
    s_c, s_h = 1 + 0.045 * c_m, 1 + 0.015 * c_m * t
    spin = 30 * np.exp(-(((h_m - 275) / 25) ** 2))
    r_t = -2 * np.sqrt(c_m**7 / (c_m**7 + 25**7)) * np.sin(np.radians(2 * spin))
    return float(
        np.sqrt(
            (d_l / s_l) ** 2 + (d_c / s_c) ** 2 + (d_h / s_h) ** 2 + r_t * (d_c / s_c) * (d_h / s_h)
        )
    )
