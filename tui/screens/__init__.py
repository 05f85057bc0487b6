"""Screens of the terminal interface and the widgets they are made of; each pane's handlers live with the pane."""
