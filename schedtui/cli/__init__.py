"""The commands: what schedtui does without a screen."""
