"""From a cage to its drawing: elevation, sections, bars pulled out, diagram, schedule, notes."""
