// Working memory of the kernels is written before it is read; clearing it first would cost as much as a short train.
[module: System.Runtime.CompilerServices.SkipLocalsInit]
