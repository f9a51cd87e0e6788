"""Pen strokes as polylines, drawn straight into cells: styles that MNIST lacks, lines through digits, scribble."""

import torch

WIDTH_PX, HEIGHT_PX = 32, 40
_YS, _XS = torch.meshgrid(torch.arange(HEIGHT_PX) + 0.5, torch.arange(WIDTH_PX) + 0.5, indexing="ij")
PIXELS = torch.stack([_XS, _YS], -1).reshape(-1, 2)


def uniform(n: int, low: float, high: float) -> torch.Tensor:
    return torch.rand(n) * (high - low) + low


def draw(points: torch.Tensor, pen_px: torch.Tensor) -> torch.Tensor:
    """Coverage [n, 40, 32] of one polyline a cell: points [n, k, 2] in pixels, pen width [n] in pixels."""
    a, b = points[:, :-1, None], points[:, 1:, None]
    along = b - a
    length2 = (along * along).sum(-1).clamp(min=1e-6)
    out = torch.full((len(points), PIXELS.shape[0]), 1e9)
    for k in range(along.shape[1]):
        offset = PIXELS[None] - a[:, k]
        t = ((offset * along[:, k]).sum(-1) / length2[:, k]).clamp(0, 1)
        nearest = offset - t[..., None] * along[:, k]
        out = torch.minimum(out, (nearest * nearest).sum(-1))
    cover = (pen_px[:, None] / 2 + 0.5 - out.sqrt()).clamp(0, 1)
    return cover.reshape(-1, HEIGHT_PX, WIDTH_PX)


# Skeletons in a unit square, y down; two strokes where the pen is lifted.
SKELETONS: dict[str, tuple[int, list[list[tuple[float, float]]]]] = {
    "one, flag": (1, [[(0.1, 0.35), (0.6, 0.0), (0.6, 0.5), (0.6, 1.0)]]),
    "one, long flag": (1, [[(-0.05, 0.5), (0.6, 0.0), (0.62, 0.5), (0.62, 1.0)]]),
    "one, foot": (1, [[(0.2, 0.25), (0.55, 0.0), (0.55, 0.5), (0.55, 1.0)], [(0.15, 1.0), (0.95, 1.0)]]),
    "one, bare": (1, [[(0.5, 0.0), (0.5, 0.3), (0.5, 0.7), (0.5, 1.0)]]),
    "seven, crossed": (7, [[(0.0, 0.0), (0.95, 0.0), (0.6, 0.5), (0.35, 1.0)], [(0.2, 0.5), (0.85, 0.48)]]),
    "seven, hooked and crossed": (7, [[(0.0, 0.2), (0.02, 0.0), (0.95, 0.02), (0.35, 1.0)], [(0.25, 0.52), (0.85, 0.5)]]),
    "seven, hooked": (7, [[(0.0, 0.2), (0.02, 0.0), (0.95, 0.02), (0.35, 1.0)]]),
    "seven, plain": (7, [[(0.0, 0.0), (0.95, 0.0), (0.6, 0.5), (0.4, 1.0)]]),
    "four, open": (4, [[(0.25, 0.0), (0.05, 0.6), (0.5, 0.62), (1.0, 0.6)], [(0.75, 0.25), (0.72, 1.0)]]),
    "four, high open": (4, [[(0.1, 0.0), (0.05, 0.5), (0.5, 0.52), (0.8, 0.5)], [(0.8, 0.0), (0.78, 1.0)]]),
    "four, closed": (4, [[(0.7, 1.0), (0.7, 0.0), (0.0, 0.65), (1.0, 0.65)]]),
}
NAMES = list(SKELETONS)


def styled(choice: torch.Tensor, height: torch.Tensor, centre: torch.Tensor, pen: torch.Tensor) -> tuple[torch.Tensor, torch.Tensor]:
    """Cells [n, 40, 32] of drawn digits in European styles, and their labels."""
    n = len(choice)
    out = torch.zeros(n, HEIGHT_PX, WIDTH_PX)
    labels = torch.zeros(n, dtype=torch.int64)
    width = height * uniform(n, 0.4, 0.75)
    slant = uniform(n, -0.15, 0.3)
    for index, name in enumerate(NAMES):
        rows = (choice == index).nonzero()[:, 0]
        if len(rows) == 0:
            continue
        label, parts = SKELETONS[name]
        labels[rows] = label
        for part in parts:
            unit = torch.tensor(part)[None] + torch.randn(len(rows), len(part), 2) * 0.045
            y = (unit[..., 1] - 0.5) * height[rows, None]
            x = (unit[..., 0] - 0.5) * width[rows, None] - slant[rows, None] * y
            points = torch.stack([x + centre[rows, 0:1], y + centre[rows, 1:2]], -1)
            out[rows] = torch.maximum(out[rows], draw(points, pen[rows]))
    return out, labels


def line_through(centre: torch.Tensor, height: torch.Tensor, steepest_deg: float) -> torch.Tensor:
    """End points and a wavering middle of a line that crosses the whole digit: [n, 4, 2]."""
    n = len(centre)
    angle = uniform(n, -steepest_deg, steepest_deg) * 3.14159 / 180
    reach = (height * 0.35 + uniform(n, 4.0, 9.0)).clamp(max=19)
    # A line through a whole comb runs over the box's edges.
    reach = torch.where(torch.rand(n) < 0.3, torch.full((n,), 26.0), reach)
    middle = centre + torch.stack([torch.randn(n) * 1.5, torch.randn(n) * 0.1 * height], -1)
    t = torch.tensor([-1.0, -0.33, 0.33, 1.0])[None] * reach[:, None]
    direction = torch.stack([angle.cos(), angle.sin()], -1)
    points = middle[:, None] + t[..., None] * direction[:, None]
    points = points + torch.randn(n, 4, 2) * 0.6
    return points


def scribble(centre: torch.Tensor, height: torch.Tensor, knots: int = 12) -> torch.Tensor:
    """A zigzag over the digit: [n, knots, 2]."""
    n = len(centre)
    side = torch.tensor([1.0, -1.0]).repeat((knots + 1) // 2)[:knots][None]
    across = side * uniform(n, 0.25, 0.55)[:, None] * height[:, None] * uniform(n * knots, 0.6, 1.2).reshape(n, knots)
    down = torch.linspace(-0.5, 0.5, knots)[None] * height[:, None] * uniform(n, 0.5, 1.1)[:, None]
    down = down + torch.randn(n, knots) * 0.06 * height[:, None]
    turn = torch.rand(n)[:, None] * 3.14159
    x = across * turn.cos() - down * turn.sin()
    y = across * turn.sin() + down * turn.cos()
    return torch.stack([x + centre[:, 0:1], y + centre[:, 1:2]], -1)
