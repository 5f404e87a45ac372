"""How a page looks in each format; a format renders any page."""
