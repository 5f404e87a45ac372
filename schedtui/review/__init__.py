"""What a schedule requires, held against what it states.

Evaluates each unit at each condition, runs the checks over the results and judges what they find.
Prints nothing and knows no screen.
"""
