"""What a slice of the cage can carry, and the stress a bar can develop."""
