"""The digit net: nine small convolutions with skips, then two dense layers; raw logits of twelve classes out."""

import torch
from torch import nn

CLASSES = 12


class Conv(nn.Module):
    def __init__(self, inputs: int, outputs: int, stride: int = 1):
        super().__init__()
        self.conv = nn.Conv2d(inputs, outputs, 3, stride, 1, bias=False)
        self.norm = nn.BatchNorm2d(outputs)
        self.skip = inputs == outputs and stride == 1

    def forward(self, x: torch.Tensor) -> torch.Tensor:
        y = self.norm(self.conv(x))
        return torch.relu(y + x) if self.skip else torch.relu(y)


class Net(nn.Module):
    def __init__(self, widths: tuple[int, int, int, int] = (16, 32, 64, 96), dense: int = 96):
        super().__init__()
        a, b, c, d = widths
        self.body = nn.Sequential(
            Conv(1, a), Conv(a, b, 2), Conv(b, b), Conv(b, c, 2), Conv(c, c), Conv(c, c), Conv(c, d, 2), Conv(d, d)
        )
        self.drop = nn.Dropout(0.3)
        self.hidden = nn.Linear(20 * d, dense)
        self.last = nn.Linear(dense, CLASSES)

    def forward(self, x: torch.Tensor) -> torch.Tensor:
        flat = self.body(x).contiguous().flatten(1)
        return self.last(torch.relu(self.hidden(self.drop(flat))))


class Folded(nn.Module):
    """One convolution with its batch normalisation worked into weight and bias."""

    def __init__(self, source: Conv):
        super().__init__()
        scale = source.norm.weight / (source.norm.running_var + source.norm.eps).sqrt()
        old = source.conv
        self.conv = nn.Conv2d(old.in_channels, old.out_channels, 3, old.stride, 1, bias=True)
        self.conv.weight.data = (old.weight * scale[:, None, None, None]).detach().contiguous()
        self.conv.bias.data = (source.norm.bias - source.norm.running_mean * scale).detach()
        self.skip = source.skip

    def forward(self, x: torch.Tensor) -> torch.Tensor:
        y = self.conv(x)
        return torch.relu(y + x) if self.skip else torch.relu(y)


def folded(net: Net) -> nn.Module:
    """The same function for use: no batch normalisation, no dropout."""
    return nn.Sequential(
        *[Folded(block) for block in net.body], nn.Flatten(), net.hidden, nn.ReLU(), net.last
    ).eval()
