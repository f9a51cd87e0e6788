"""The digit net: eight small convolutions with skips, then two dense layers; raw logits of twelve classes out."""

import torch
from torch import nn

CLASSES = 12


class Conv(nn.Module):
    def __init__(self, inputs: int, outputs: int, stride: int = 1, side: int = 3):
        super().__init__()
        self.conv = nn.Conv2d(inputs, outputs, side, stride, side // 2, bias=False)
        self.norm = nn.BatchNorm2d(outputs)
        self.skip = inputs == outputs and stride == 1

    def forward(self, x: torch.Tensor) -> torch.Tensor:
        y = self.norm(self.conv(x))
        return torch.relu(y + x) if self.skip else torch.relu(y)


class Net(nn.Module):
    def __init__(self, widths: tuple[int, int, int] = (32, 64, 112), dense: int = 64):
        super().__init__()
        a, b, c = widths
        self.body = nn.Sequential(
            # Strokes are three pixels wide and more: a wide first step loses nothing and halves the cost of the rest.
            Conv(1, a, 2, 5), Conv(a, a), Conv(a, b, 2), Conv(b, b), Conv(b, b), Conv(b, b), Conv(b, c, 2), Conv(c, c)
        )
        self.drop = nn.Dropout(0.3)
        self.hidden = nn.Linear(20 * c, dense)
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
        self.conv = nn.Conv2d(old.in_channels, old.out_channels, old.kernel_size, old.stride, old.padding, bias=True)
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
