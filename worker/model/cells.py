"""Makes cells as the cutter hands them to the net: 32 x 40 pixels, 5 a millimetre, paper 0, printed black 1.

Everything is drawn for a whole batch at once. `hardness` (0..1, one a cell) scales the disturbances: 0 is a
pen on a flat scan, 1 a poor photo. The photo simulator in tests/ shares nothing with this file, on purpose:
a figure taken with the generator a net was trained on says little.
"""

import torch
from torch.nn.functional import conv2d, grid_sample, interpolate, max_pool2d

from strokes import HEIGHT_PX, NAMES, WIDTH_PX, draw, line_through, scribble, styled, uniform

BLANK, VOID = 10, 11
XS = torch.arange(WIDTH_PX) + 0.5
YS = torch.arange(HEIGHT_PX) + 0.5


def _mask(n: int, share: float) -> torch.Tensor:
    return torch.rand(n) < share


def _smooth(n: int, rows: int, columns: int) -> torch.Tensor:
    """A smooth random field [n, 40, 32] of unit size from a coarse one."""
    return interpolate(torch.randn(n, 1, rows, columns), size=(HEIGHT_PX, WIDTH_PX), mode="bicubic", align_corners=False)[:, 0]


def _digit(images: torch.Tensor, centre: torch.Tensor, height: torch.Tensor, narrow: torch.Tensor, wide: torch.Tensor) -> torch.Tensor:
    """MNIST digits [n, 56, 56] set into cells with their own size, turn, shear, pen width and waver."""
    n = len(images)
    turn, shear = torch.randn(n) * 0.09, torch.randn(n) * 0.14
    scale = 20 / height
    x = XS[None, None] - centre[:, 0, None, None]
    y = YS[None, :, None] - centre[:, 1, None, None]
    x, y = x.expand(n, HEIGHT_PX, WIDTH_PX), y.expand(n, HEIGHT_PX, WIDTH_PX)
    cos, sin = turn.cos()[:, None, None], turn.sin()[:, None, None]
    u = (x * cos + y * sin) + shear[:, None, None] * y
    v = -x * sin + y * cos
    waver = uniform(n, 0.0, 0.7)[:, None, None]
    u = u * (scale / narrow)[:, None, None] + waver * _smooth(n, 6, 5)
    v = v * scale[:, None, None] + waver * _smooth(n, 6, 5)
    grid = torch.stack([u / 14, v / 14], -1)
    raw = grid_sample(images[:, None].float() / 255, grid, mode="bilinear", padding_mode="zeros", align_corners=False)[:, 0]
    # A high level leaves the spine of the stroke (thin pen), a low one its whole blob (thick pen).
    level = (0.62 - 0.42 * wide)[:, None, None]
    thick = (wide > 0.9).nonzero()[:, 0]
    raw[thick] = max_pool2d(raw[thick][:, None], 3, 1, 1)[:, 0]
    return ((raw - level) * uniform(n, 2.0, 5.0)[:, None, None] + 0.5).clamp(0, 1) * (raw > 0.02)


def _across(centre_px: torch.Tensor, width_px: torch.Tensor, axis: torch.Tensor) -> torch.Tensor:
    return (width_px[:, None] / 2 + 0.5 - (axis[None] - centre_px[:, None]).abs()).clamp(0, 1)


def frames(n: int) -> tuple[torch.Tensor, torch.Tensor]:
    """Printed frame with its neighbours, heavy comb ends, points and colons: darkness [n, 40, 32] and the box's centre [n, 2]."""
    slip = (torch.randn(n, 2) * uniform(n, 0.2, 1.4)[:, None]).clamp(-3.2, 3.2)
    centre = torch.tensor([WIDTH_PX / 2, HEIGHT_PX / 2])[None] + slip
    half_w, half_h = uniform(n, 13.4, 14.6), uniform(n, 17.1, 18.5)
    line = uniform(n, 0.7, 1.8)
    grey = uniform(n, 0.12, 0.5)
    left, right = centre[:, 0] - half_w, centre[:, 0] + half_w
    top, bottom = centre[:, 1] - half_h, centre[:, 1] + half_h
    inside_y = ((YS[None] - top[:, None] + 1).clamp(0, 1) * (bottom[:, None] - YS[None] + 1).clamp(0, 1))[:, :, None]
    gap_l, gap_r = uniform(n, 0, 12) * _mask(n, 0.5), uniform(n, 0, 12) * _mask(n, 0.5)
    open_l = torch.sigmoid((left[:, None] - XS[None]) * 4) * torch.sigmoid((XS[None] - (left - gap_l)[:, None]) * 4) * _mask(n, 0.9)[:, None]
    open_r = torch.sigmoid((XS[None] - right[:, None]) * 4) * torch.sigmoid(((right + gap_r)[:, None] - XS[None]) * 4)
    rows = torch.maximum(_across(top, line, YS), _across(bottom, line, YS))[:, :, None] * (1 - open_l - open_r).clamp(0, 1)[:, None]
    verticals = torch.zeros(n, WIDTH_PX)
    for edge in (left, right, left - gap_l, right + gap_r):
        verticals = torch.maximum(verticals, _across(edge, line, XS))
    dark = torch.maximum(rows, verticals[:, None] * inside_y) * grey[:, None, None]
    # The ends of a comb are heavier and darker than the frames between.
    for edge, side in ((left, -1), (right, 1)):
        thick = uniform(n, 2.0, 5.0)
        bar = _across(edge + side * uniform(n, 0.0, 2.0), thick, XS)[:, None] * inside_y * (uniform(n, 0.4, 1.0) * _mask(n, 0.2))[:, None, None]
        dark = torch.maximum(dark, bar)
    # A printed point or colon stands beside the box, sometimes a little inside it.
    side = torch.where(_mask(n, 0.5), left - uniform(n, -2.5, 3), right + uniform(n, -2.5, 3))
    for share, height in ((0.22, uniform(n, 13, 19)), (0.08, uniform(n, -8, -3)), (0.08, uniform(n, 3, 8))):
        away2 = (XS[None, None] - side[:, None, None]) ** 2 + (YS[None, :, None] - (centre[:, 1] + height)[:, None, None]) ** 2
        dot = (uniform(n, 1.2, 3.0)[:, None, None] + 0.5 - away2.sqrt()).clamp(0, 1) * (uniform(n, 0.4, 1.0) * _mask(n, share))[:, None, None]
        dark = torch.maximum(dark, dot)
    # Frames may be faint, missing, or partly worn off.
    worn = (_smooth(n, 4, 4) * 0.8 + 1.2).clamp(0, 1)
    keep = torch.where(_mask(n, 0.1), torch.zeros(n), torch.ones(n))
    return dark * torch.where(_mask(n, 0.3)[:, None, None], worn, torch.ones_like(worn)) * keep[:, None, None], centre


def camera(value: torch.Tensor, hardness: torch.Tensor) -> torch.Tensor:
    """Blur, light, grain and an imperfect estimate of the paper and ink levels."""
    n = len(value)
    soft = 0.35 + hardness * uniform(n, 0.0, 1.0)
    moved = soft + hardness * uniform(n, 0.0, 1.6) * _mask(n, 0.3)
    turn = torch.rand(n) * 3.14159
    grid = torch.arange(-4, 5).float()
    gx, gy = grid[None, None, :], grid[None, :, None]
    a = gx * turn.cos()[:, None, None] + gy * turn.sin()[:, None, None]
    b = -gx * turn.sin()[:, None, None] + gy * turn.cos()[:, None, None]
    kernel = torch.exp(-0.5 * ((a / moved[:, None, None]) ** 2 + (b / soft[:, None, None]) ** 2))
    kernel = kernel / kernel.sum((1, 2), keepdim=True)
    padded = torch.nn.functional.pad(value[None], (4, 4, 4, 4), mode="replicate")
    value = conv2d(padded, kernel[:, None], groups=n)[0]
    # A shadow's edge across the cell, and a slope of light.
    angle = torch.rand(n) * 6.2832
    far = (XS[None, None] - uniform(n, 4, 28)[:, None, None]) * angle.cos()[:, None, None] + (
        YS[None, :, None] - uniform(n, 4, 36)[:, None, None]
    ) * angle.sin()[:, None, None]
    edge = torch.sigmoid(far / uniform(n, 0.6, 8.0)[:, None, None]) * (hardness * uniform(n, 0.0, 0.5) * _mask(n, 0.25))[:, None, None]
    slope = far / 20 * (hardness * torch.randn(n) * 0.05)[:, None, None]
    value = 1 - (1 - value) * (1 - edge) * (1 - slope)
    gain = (1 + torch.randn(n) * (0.05 + 0.08 * hardness)).clamp(0.6, 1.5)
    base = torch.randn(n) * (0.008 + 0.03 * hardness)
    value = value * gain[:, None, None] + base[:, None, None]
    grain = 0.006 + hardness * uniform(n, 0.0, 0.1)
    value = value + torch.randn(value.shape) * grain[:, None, None]
    # JPEG works on blocks larger than a pixel here: noise that is smooth over 2 to 4 pixels, strongest near strokes.
    ringing = (hardness * uniform(n, 0.0, 0.05))[:, None, None] * (0.4 + value.clamp(0, 1))
    return (value + _smooth(n, 16, 13) * ringing).clamp(0, 1)


class Generator:
    """Cells from a set of MNIST digits; every call draws new ones from torch's own seeded random numbers."""

    def __init__(self, images: torch.Tensor, labels: torch.Tensor):
        self.images, self.labels = images, labels

    def _neighbours(self, n: int) -> torch.Tensor:
        """Strokes of neighbouring boxes that reach into the crop."""
        out = torch.zeros(n, HEIGHT_PX, WIDTH_PX)
        rows = _mask(n, 0.35).nonzero()[:, 0]
        if len(rows) == 0:
            return out
        m = len(rows)
        height = uniform(m, 18, 36)
        side = torch.where(_mask(m, 0.5), 1.0, -1.0)
        beside = torch.stack([16 + side * uniform(m, 23, 34), 20 + torch.randn(m) * 3], -1)
        above = torch.stack([16 + torch.randn(m) * 5, 20 + side * uniform(m, 32, 44)], -1)
        centre = torch.where(_mask(m, 0.75)[:, None], beside, above)
        pick = torch.randint(len(self.images), (m,))
        ink = _digit(self.images[pick], centre, height, uniform(m, 0.8, 1.2), torch.rand(m))
        # In the middle of the box a neighbour's stroke would be ink of this box.
        reach = ((XS[None, None] - 16).abs() / 12.0).expand(m, HEIGHT_PX, WIDTH_PX)
        reach = torch.maximum(reach, ((YS[None, :, None] - 20).abs() / 15.5).expand(m, HEIGHT_PX, WIDTH_PX))
        out[rows] = ink * ((reach - 0.75) * 8).clamp(0, 1)
        return out

    def _dust(self, n: int) -> torch.Tensor:
        out = torch.zeros(n, HEIGHT_PX, WIDTH_PX)
        for share in (0.2, 0.1):
            x, y, r = uniform(n, 0, 32), uniform(n, 0, 40), uniform(n, 0.2, 1.4)
            away = ((XS[None, None] - x[:, None, None]) ** 2 + (YS[None, :, None] - y[:, None, None]) ** 2).sqrt()
            out = torch.maximum(out, (r[:, None, None] + 0.5 - away).clamp(0, 1) * (uniform(n, 0.1, 1.0) * _mask(n, share))[:, None, None])
        return out

    def _slip(self, n: int, box: torch.Tensor) -> torch.Tensor:
        """A short stray stroke over the frame: it does not spoil the digit."""
        out = torch.zeros(n, HEIGHT_PX, WIDTH_PX)
        rows = _mask(n, 0.06).nonzero()[:, 0]
        if len(rows) == 0:
            return out
        m = len(rows)
        angle = torch.rand(m) * 6.2832
        start = box[rows] + torch.stack([angle.cos() * 13, angle.sin() * 17], -1)
        end = start + torch.randn(m, 2) * 2.5
        out[rows] = draw(torch.stack([start, end], 1), uniform(m, 1.2, 3.2))
        return out

    def _void(self, pick: torch.Tensor, ink: torch.Tensor, centre: torch.Tensor, height: torch.Tensor, wide: torch.Tensor, narrow: torch.Tensor) -> torch.Tensor:
        n = len(pick)
        kind = torch.randint(0, 100, (n,))
        pen = 1.6 + 2.6 * wide + torch.randn(n) * 0.3
        pen = pen.clamp(1.2, 5)
        out = ink.clone()

        def rows(low: int, high: int) -> torch.Tensor:
            return ((kind >= low) & (kind < high)).nonzero()[:, 0]

        def over(r: torch.Tensor, points: torch.Tensor) -> None:
            out[r] = torch.maximum(out[r], draw(points, pen[r]))

        r = rows(0, 30)  # one line, mostly level
        if len(r):
            over(r, line_through(centre[r], height[r], 35.0))
        r = rows(30, 40)  # one steep line
        if len(r):
            over(r, line_through(centre[r], height[r] * 1.2, 65.0))
        r = rows(40, 52)  # two lines, near parallel or crossing
        if len(r):
            first = line_through(centre[r], height[r], 40.0)
            over(r, first)
            over(r, torch.where(_mask(len(r), 0.5)[:, None, None], first + torch.randn(len(r), 1, 2) * torch.tensor([1.0, 4.0]), line_through(centre[r], height[r], 60.0)))
        r = rows(52, 68)  # scribble, with or without a digit below
        if len(r):
            out[r] *= _mask(len(r), 0.8)[:, None, None]
            over(r, scribble(centre[r], height[r].clamp(16, 34)))
        r = rows(68, 82)  # two digits side by side in one box
        if len(r):
            other = self._other(pick[r])
            apart = uniform(len(r), 5.5, 8.0)
            small = height[r].clamp(15, 27)
            squeeze = uniform(len(r), 0.5, 0.75)
            left = centre[r] - torch.stack([apart, torch.randn(len(r)) * 1.5], -1)
            right = centre[r] + torch.stack([apart, torch.randn(len(r)) * 1.5], -1)
            out[r] = torch.maximum(
                _digit(self.images[pick[r]], left, small, squeeze, wide[r]), _digit(self.images[other], right, small, squeeze, wide[r])
            )
        r = rows(82, 95)  # one digit written over another
        if len(r):
            other = self._other(pick[r])
            shifted = centre[r] + torch.randn(len(r), 2) * 2.0
            second = _digit(self.images[other], shifted, (height[r] * uniform(len(r), 0.85, 1.2)).clamp(12, 38), narrow[r], (wide[r] + 0.2).clamp(max=1))
            both = torch.maximum(out[r], second)
            # Where the second hides in the first nobody could tell: cross such cells out as well.
            alike = both.sum((1, 2)) < 1.35 * torch.maximum(out[r].sum((1, 2)), second.sum((1, 2)))
            crossed = torch.maximum(both, draw(line_through(centre[r], height[r], 35.0), pen[r]))
            out[r] = torch.where(alike[:, None, None], crossed, both)
        r = rows(95, 98)  # spilled
        if len(r):
            blot = ((_smooth(len(r), 4, 4) + 0.9) * 2.0).clamp(0, 1)
            out[r] = torch.maximum(out[r], blot * uniform(len(r), 0.75, 1.0)[:, None, None])
        r = rows(98, 100)  # a dash instead of a digit
        if len(r):
            out[r] = draw(line_through(centre[r], height[r].clamp(max=14), 12.0), pen[r])
        return out

    def _other(self, pick: torch.Tensor) -> torch.Tensor:
        other = torch.randint(len(self.images), (len(pick),))
        again = torch.randint(len(self.images), (len(pick),))
        return torch.where(self.labels[other] == self.labels[pick], again, other)

    def batch(self, pick: torch.Tensor, hardness: torch.Tensor, blank: float = 0.08, void: float = 0.14, style: float = 0.05) -> tuple[torch.Tensor, torch.Tensor]:
        """Cells [n, 1, 40, 32] and classes [n] for the digits picked; shares of blanks, voids and drawn styles."""
        n = len(pick)
        labels = self.labels[pick].clone()
        frame, box = frames(n)
        height = (28 + torch.randn(n) * 4.5).clamp(15, 39)
        narrow = (1 + torch.randn(n) * 0.12).clamp(0.65, 1.35)
        wide = torch.rand(n)
        centre = box + torch.randn(n, 2) * torch.tensor([1.8, 2.2])
        ink = _digit(self.images[pick], centre, height, narrow, wide)
        rows = _mask(n, style).nonzero()[:, 0]
        if len(rows):
            drawn, drawn_labels = styled(torch.randint(len(NAMES), (len(rows),)), height[rows], centre[rows], 1.4 + 3.0 * wide[rows])
            ink[rows], labels[rows] = drawn, drawn_labels
        ink = torch.maximum(ink, self._slip(n, box))
        chance = torch.rand(n)
        rows = (chance < void).nonzero()[:, 0]
        if len(rows):
            ink[rows] = self._void(pick[rows], ink[rows], centre[rows], height[rows], wide[rows], narrow[rows])
            labels[rows] = VOID
        empty = chance > 1 - blank
        ink[empty] = 0
        labels[empty] = BLANK
        # Pens: black, blue, pencil; a dry one leaves gaps of its own.
        kind = torch.rand(n)
        dark = torch.where(kind < 0.5, uniform(n, 0.75, 1.05), torch.where(kind < 0.88, uniform(n, 0.5, 0.9), uniform(n, 0.28, 0.6)))
        dry = uniform(n, 0.0, 0.45) * _mask(n, 0.25)
        ink = torch.maximum(ink, self._neighbours(n)) * (1 - dry[:, None, None] * torch.rand(n, HEIGHT_PX, WIDTH_PX))
        ink = ink * dark[:, None, None]
        value = frame + ink * (1 - frame)
        value = torch.maximum(value, self._dust(n) * (0.2 + 0.8 * hardness)[:, None, None])
        return camera(value, hardness)[:, None], labels
