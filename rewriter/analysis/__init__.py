"""What holds, when it wakes, and what stands in the way; works on the model alone."""
